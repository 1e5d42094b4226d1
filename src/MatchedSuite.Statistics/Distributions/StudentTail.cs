namespace MatchedSuite.Statistics.Distributions;

/// <summary>The tail of Student's t at t ≥ 0 for any df &gt; 0; df = ∞ is the normal distribution, by the same formulas.</summary>
/// <remarks>
/// <para>With v = 1/df, w = t²·v and density f: the tail is f·(1 + w)/t·K, where K is Gauss's continued fraction of the
/// hypergeometric function 2F1(½, 1; df/2 + 1; −df/t²), and the centre P(0 &lt; T &lt; t) is f·t·S with a power series S of
/// positive terms (Abramowitz and Stegun 1964, 26.5.4, 26.7.1; Cuyt et al. 2008, Handbook of Continued Fractions, 15.3).
/// Written in v, both turn into Laplace's fraction and the series of the normal integral at v = 0.</para>
/// <para>In the variable q = df·log(1 + w) the logarithm of the tail has the slope −1/(2K), which is nearly −½ far out:
/// Newton's method in q finds any quantile in a few steps and never meets a number that overflows.</para>
/// </remarks>
internal static class StudentTail
{
    // Where the fraction takes over from the series: beyond it the fraction needs fewer steps, and ½ − centre would lose digits.
    private const double FractionFromSquare = 5;
    private const double FractionFromRatio = 0.5;

    // The fraction's convergents enclose K; four steps apart this close, the newer one has all its digits.
    private const double Close = 4e-16;
    private const double RescaleAbove = 1e150;

    /// <summary>P(T &gt; t) for t ≥ 0.</summary>
    public static Probability Upper(double t, double df)
    {
        double v = 1 / df;
        double square = t * t;
        double w = square * v;
        if (IsCentral(square, w))
        {
            double centre = Centre(t, df);
            double tail = 0.5 - centre;
            return new Probability(tail, Math.Log10(tail));
        }
        // t² overflows only where 1 + w and w are the same.
        double logOnePlusRatio = double.IsPositiveInfinity(w) ? 2 * Math.Log(t) - Math.Log(df) : LogOnePlus.Of(w);
        double fraction = Fraction(1 / square, v);
        double constant = StandardNormal.DensityAtZero * StirlingCorrection.HalfStepRatio(0.5 * df);
        return v == 0
            ? Tails.Scaled(-0.5 * square, constant * fraction / t)
            : Tails.Scaled(-0.5 * (df - 1) * logOnePlusRatio, constant * fraction / t);
    }

    /// <summary>P(0 &lt; T &lt; t) for t ≥ 0 not far out: the series needs about 37/log(1 + df/t²) terms when df is small.</summary>
    public static double Centre(double t, double df)
    {
        double v = 1 / df;
        double square = t * t;
        double step = square / (1 + square * v);
        double term = 1;
        double sum = 1;
        for (int odd = 1; ; odd += 2)
        {
            term *= (1 + odd * v) * step / (odd + 2);
            double longer = sum + term;
            // Negated, so that NaN ends the loop too.
            if (!(longer > sum))
                return Density(t, df) * t * sum;
            sum = longer;
        }
    }

    /// <summary>The density at t.</summary>
    public static double Density(double t, double df)
    {
        double v = 1 / df;
        double square = t * t;
        double exponent = v == 0 ? -0.5 * square : -0.5 * (df + 1) * LogOnePlus.Of(square * v);
        return StandardNormal.DensityAtZero * StirlingCorrection.HalfStepRatio(0.5 * df) * Math.Exp(exponent);
    }

    /// <summary>t ≥ 0 with P(T &gt; t) = exp(<paramref name="logTail"/>), for a tail of at most about 0.3.</summary>
    /// <param name="logTail">Natural logarithm of the tail.</param>
    /// <param name="df">Degrees of freedom, greater than 0, or infinite.</param>
    /// <param name="start">A guess at the normal quantile of the same tail.</param>
    public static double FarQuantile(double logTail, double df, double start)
    {
        double v = 1 / df;
        double constant = StandardNormal.DensityAtZero * StirlingCorrection.HalfStepRatio(0.5 * df);
        double logConstant = Math.Log(constant);
        // Wallace (1959): the normal deviate of t is near √q·(8 df + 1)/(8 df + 3).
        double stretch = v == 0 ? 1 : (8 * df + 3) / (8 * df + 1);
        double q = start * start * stretch * stretch;
        for (int i = 0; i < 100; i++)
        {
            double scaled = q * v;
            double square = v == 0 ? q : LogOnePlus.Inverse(scaled) / v;
            double error, fraction;
            if (IsCentral(square, square * v))
            {
                double t = Math.Sqrt(square);
                double tail = 0.5 - Centre(t, df);
                fraction = tail * t / (Density(t, df) * (1 + square * v));
                error = Math.Log(tail) - logTail;
            }
            else
            {
                fraction = Fraction(1 / square, v);
                double logSquare = double.IsPositiveInfinity(square) ? scaled + Math.Log(df) : Math.Log(square);
                error = logConstant - 0.5 * q * (1 - v) - 0.5 * logSquare + Math.Log(fraction) - logTail;
            }
            double next = Math.Max(q + 2 * fraction * error, 0.125 * q);
            bool found = Math.Abs(next - q) <= 1e-9 * q;
            q = next;
            // Newton doubles the digits in each step: nine become all.
            if (found)
                break;
        }
        return v == 0 ? Math.Sqrt(q)
            : q * v > 600 ? Math.Exp(0.5 * (q * v + Math.Log(df)))
            : Math.Sqrt(LogOnePlus.Inverse(q * v) * df);
    }

    /// <summary>t ≥ 0 with P(0 &lt; T &lt; t) = <paramref name="centre"/>, for a centre of at most about 0.3.</summary>
    public static double NearQuantile(double centre, double df)
    {
        // The centre is concave in t, so Newton's method climbs to the answer from below.
        double t = centre / Density(0, df);
        for (int i = 0; i < 100; i++)
        {
            double step = (centre - Centre(t, df)) / Density(t, df);
            t += step;
            if (Math.Abs(step) <= 1e-9 * t)
                break;
        }
        return t;
    }

    private static bool IsCentral(double square, double w) => square <= FractionFromSquare && w <= FractionFromRatio;

    // K = 1/(1 + a1/(d1 + a2/(d2 + ...))), a_m = m·(1 + (m−1)v)/t², d_m = 1 + 2mv, by the forward recurrence: no division inside.
    private static double Fraction(double inverseSquare, double v)
    {
        double above = 1, olderAbove = 0, below = 1, olderBelow = 1;
        double fraction = 1;
        double m = 0;
        while (true)
        {
            for (int i = 0; i < 4; i++)
            {
                double numerator = (m + 1) * (1 + m * v) * inverseSquare;
                m++;
                double partial = 1 + 2 * m * v;
                (above, olderAbove) = (partial * above + numerator * olderAbove, above);
                (below, olderBelow) = (partial * below + numerator * olderBelow, below);
            }
            double next = above / below;
            // Negated, so that NaN ends the loop too.
            if (!(Math.Abs(next - fraction) > Close * next))
                return next;
            fraction = next;
            if (below > RescaleAbove)
            {
                double scale = 1 / below;
                above *= scale;
                olderAbove *= scale;
                below = 1;
                olderBelow *= scale;
            }
        }
    }
}
