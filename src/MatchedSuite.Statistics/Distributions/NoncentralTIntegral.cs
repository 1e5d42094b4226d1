namespace MatchedSuite.Statistics.Distributions;

/// <summary>P(T &gt; t) of the noncentral t as the integral of P(Z &gt; t·s − δ) over the density of s = √(χ²/df).</summary>
/// <remarks>
/// The integrand is log-concave in s, so it has one peak. In y = log s the trapezoidal rule converges faster than any power of
/// its step (Trefethen and Weideman 2014, SIAM Review 56(3)); the step starts below the width of the peak and is halved until two
/// sums agree to eleven digits, which makes the finer one exact to rounding. Everything is scaled by the peak, so that
/// tails far below the smallest double come out by their logarithm.
/// </remarks>
internal static class NoncentralTIntegral
{
    // Halving the step about doubles the digits; this close, the finer sum has them all, and two coarse sums hardly agree by chance.
    private const double Agreement = 1e-11;
    private const double Negligible = 1e-18;

    // In widths of the peak: small enough that one halving is the rule for ten or more df.
    private const double FirstStep = 0.7;

    // The integrand is tame within π/4 of the real line only: a wider step than this could agree by chance.
    private const double LargestFirstStep = 0.25;

    /// <summary>The tail, and the derivative of its natural logarithm with respect to δ.</summary>
    public static (Probability Tail, double LogSlope) Upper(double t, double df, double delta)
    {
        double peak = Peak(t, df, delta, out double width);
        double logPeak = LogIntegrand(peak, t, df, delta, out _);
        double step = Math.Min(FirstStep * width, LargestFirstStep);
        var (sum, weighted) = Sum(peak, step, 0, logPeak, t, df, delta);
        while (true)
        {
            var (between, weightedBetween) = Sum(peak, step, 0.5 * step, logPeak, t, df, delta);
            bool agree = !(Math.Abs(between - sum) > Agreement * sum);
            sum += between;
            weighted += weightedBetween;
            step *= 0.5;
            if (agree)
                break;
        }
        // Density of y: 2·(df/2)^(df/2)/Γ(df/2)·exp(df·y − df/2·e^(2y)), its constant by Stirling's correction.
        double half = 0.5 * df;
        double scale = 2 * Math.Sqrt(half / (2 * Math.PI)) * step * sum;
        return (Tails.Scaled(logPeak - StirlingCorrection.Of(half), scale), weighted / sum);
    }

    // The peak in y: the root of df/s − df·s − t·hazard(t·s − δ), which falls in s; Newton's method within a bracket.
    private static double Peak(double t, double df, double delta, out double width)
    {
        double low = t > 0 ? 0 : 1;
        double high = t > 0 ? 1 : double.PositiveInfinity;
        double s = 1;
        for (int i = 0; i < 200; i++)
        {
            double x = t * s - delta;
            double hazard = Hazard(x, LogNormalTail(x));
            double slope = df / s - df * s - t * hazard;
            double curvature = df / (s * s) + df + t * t * hazard * Math.Max(0, hazard - x);
            if (slope > 0)
                low = s;
            else
                high = s;
            double next = s + slope / curvature;
            if (!(next > low && next < high))
                next = double.IsPositiveInfinity(high) ? 2 * s : 0.5 * (low + high);
            bool found = Math.Abs(next - s) * Math.Sqrt(curvature) < 0.01;
            s = next;
            if (found)
                break;
        }
        double at = t * s - delta;
        double rate = Hazard(at, LogNormalTail(at));
        width = 1 / Math.Sqrt(df + df * s * s + t * s * (t * s) * rate * Math.Max(0, rate - at));
        return Math.Log(s);
    }

    // The sums over peak + offset + k·step, outward from the peak until the terms no longer count.
    private static (double Sum, double Weighted) Sum(
        double peak, double step, double offset, double logPeak, double t, double df, double delta)
    {
        double sum = 0, weighted = 0;
        for (int direction = -1; direction <= 1; direction += 2)
        {
            for (int k = direction < 0 ? -1 : 0; ; k += direction)
            {
                double term = Math.Exp(LogIntegrand(peak + offset + k * step, t, df, delta, out double hazard) - logPeak);
                sum += term;
                weighted += term * hazard;
                if (!(term > Negligible * sum))
                    break;
            }
        }
        return (sum, weighted);
    }

    private static double LogIntegrand(double y, double t, double df, double delta, out double hazard)
    {
        double x = t * Math.Exp(y) - delta;
        double logTail = LogNormalTail(x);
        hazard = Hazard(x, logTail);
        double excess = LogOnePlus.Inverse(2 * y);
        // 2y − (e^(2y) − 1), without cancellation near y = 0.
        double shape = Math.Abs(y) < 0.2 ? LogOnePlus.MinusArgument(excess) : 2 * y - excess;
        return 0.5 * df * shape + logTail;
    }

    private static double LogNormalTail(double x) => StandardNormal.UpperTail(x).Log10 * Tails.LogarithmOfTen;

    private static double Hazard(double x, double logTail) => Math.Exp(-0.5 * x * x - StirlingCorrection.HalfLogTwoPi - logTail);
}
