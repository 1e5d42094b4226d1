namespace MatchedSuite.Statistics.Distributions;

/// <summary>The regularized incomplete beta function I_x(a, b), computed as itself where it is small.</summary>
/// <remarks>
/// Even part of the continued fraction DLMF 8.17.22 (Didonato and Morris 1992, "Algorithm 708", eq. 9) on the nearer side of
/// the mean, times x^a·y^b/B(a, b) written with deviances and Stirling corrections (Loader 2000), so that large shapes keep
/// their digits. The number of steps grows like the root of the larger shape near the mean.
/// </remarks>
internal static class RegularizedBeta
{
    // One unit of the last digit of 1: a quotient of two settled recurrences may stay there.
    private const double Close = 2.3e-16;

    /// <summary>I_x(a, b), the lower tail of the beta distribution.</summary>
    public static Probability Lower(double a, double b, in BetaPoint point) => point.Excess > 0
        ? Tails.Complement(Small(b, a, point.Mirrored).Value)
        : Small(a, b, point);

    /// <summary>1 − I_x(a, b), the upper tail.</summary>
    public static Probability Upper(double a, double b, in BetaPoint point) => Lower(b, a, point.Mirrored);

    /// <summary>log(x/(1 − x)) of the x with I_x(a, b) = exp(<paramref name="logTail"/>), for a tail of at most ½.</summary>
    public static double LowerLogOdds(double logTail, double a, double b)
    {
        // log I is concave in the log odds, with slope a far left: Newton's method lands left of the root and climbs.
        double logOdds = Guess(logTail, a, b);
        for (int i = 0; i < 200; i++)
        {
            BetaPoint point = BetaPoint.AtLogOdds(logOdds, a, b);
            double logCurrent = Tails.NaturalLog(Lower(a, b, point));
            double slope = Math.Exp(LogDensity(a, b, point) + Math.Log(DensityScale(a, b)) - logCurrent);
            double step = (logTail - logCurrent) / slope;
            logOdds += step;
            if (Math.Abs(step) <= 1e-9 * Math.Max(1, Math.Abs(logOdds) * 1e-3))
                break;
        }
        return logOdds;
    }

    /// <summary>log(x/(1 − x)) of the x with 1 − I_x(a, b) = exp(<paramref name="logTail"/>), for a tail of at most ½.</summary>
    public static double UpperLogOdds(double logTail, double a, double b) => -LowerLogOdds(logTail, b, a);

    private static Probability Small(double a, double b, in BetaPoint point) =>
        Tails.Scaled(LogDensity(a, b, point), DensityScale(a, b) / Fraction(a, b, point));

    /// <summary>log of x^a·y^b/B(a, b) without the factor <see cref="DensityScale"/>.</summary>
    public static double LogDensity(double a, double b, in BetaPoint point)
    {
        double u = point.Excess / a;
        double v = -point.Excess / b;
        double deviance = Math.Abs(u) < 0.5 && Math.Abs(v) < 0.5
            ? a * LogOnePlus.MinusArgument(u) + b * LogOnePlus.MinusArgument(v)
            : a * (point.LogX + LogOnePlus.Of(b / a)) + b * (point.LogY + LogOnePlus.Of(a / b));
        return deviance + StirlingCorrection.Of(a + b) - StirlingCorrection.Of(a) - StirlingCorrection.Of(b);
    }

    /// <summary>√(a·b/(2π(a + b))): the part of the density that needs no logarithm.</summary>
    public static double DensityScale(double a, double b) => StandardNormal.DensityAtZero * Math.Sqrt(a * (b / (a + b)));

    // Partial numerators a_m = (a+m−1)(a+b+m−1)m(b−m)x²/(a+2m−1)², partial denominators as below; modified Lentz method.
    private static double Fraction(double a, double b, in BetaPoint point)
    {
        double x = point.X;
        double gap = 1 - point.Excess;
        double turn = 1 + point.Y;
        double value = a * gap / (a + 1);
        double c = value;
        double d = 0;
        for (double m = 1; ; m++)
        {
            double odd = 1 / (a + 2 * m - 1);
            double shared = m * (b - m) * x * odd;
            double numerator = (a + m - 1) * (a + b + m - 1) * x * odd * shared;
            double denominator = m + shared + (a + m) * (gap + m * turn) / (a + 2 * m + 1);
            d = 1 / (denominator + numerator * d);
            c = denominator + numerator / c;
            double factor = c * d;
            value *= factor;
            // Negated, so that NaN ends the loop too.
            if (!(Math.Abs(factor - 1) > Close))
                return value;
        }
    }

    private static double Guess(double logTail, double a, double b)
    {
        if (a > 1 && b > 1)
        {
            // Abramowitz and Stegun (1964) 26.5.22.
            double z = StandardNormal.RoughUpperQuantile(logTail);
            double harmonic = 2 / (1 / (2 * a - 1) + 1 / (2 * b - 1));
            double lambda = (z * z - 3) / 6;
            double w = z * Math.Sqrt(Math.Max(0, harmonic + lambda)) / harmonic
                - (1 / (2 * b - 1) - 1 / (2 * a - 1)) * (lambda + 5.0 / 6 - 2 / (3 * harmonic));
            return Math.Log(a / b) - 2 * w;
        }
        // Near 0 the tail is x^a/(a·B(a, b)).
        double logBeta = LogGamma.Of(a) + LogGamma.Of(b) - LogGamma.Of(a + b);
        return Math.Min((logTail + Math.Log(a) + logBeta) / a, Math.Log(a / b));
    }
}
