namespace MatchedSuite.Statistics.Distributions;

/// <summary>The regularized incomplete gamma functions P(a, x) and Q(a, x), each computed as itself where it is small.</summary>
/// <remarks>
/// Power series below the mean, Legendre's continued fraction above it (Abramowitz and Stegun 1964, 6.5.29 and 6.5.31), both
/// times x^a·e^−x/Γ(a) written as a deviance and a Stirling correction (Loader 2000), so that large a keeps its digits.
/// Near x = a the number of terms grows like √a.
/// </remarks>
internal static class RegularizedGamma
{
    // One unit of the last digit of 1: a quotient of two settled recurrences may stay there.
    private const double Close = 2.3e-16;

    /// <summary>Q(a, x), the upper tail, for a &gt; 0.</summary>
    public static Probability Upper(double a, double x)
    {
        if (double.IsNaN(x))
            return Probability.Missing;
        if (x <= 0)
            return Probability.One;
        if (double.IsPositiveInfinity(x))
            return Probability.Zero;
        return UpperIsComplement(a, x)
            ? Tails.Complement(Tails.Scaled(LogDensity(a, x), DensityScale(a) / a * Series(a, x)).Value)
            : Tails.Scaled(LogDensity(a, x), DensityScale(a) * Fraction(a, x));
    }

    /// <summary>P(a, x), the lower tail, for a &gt; 0.</summary>
    public static Probability Lower(double a, double x)
    {
        if (double.IsNaN(x))
            return Probability.Missing;
        if (x <= 0)
            return Probability.Zero;
        if (double.IsPositiveInfinity(x))
            return Probability.One;
        return UpperIsComplement(a, x)
            ? Tails.Scaled(LogDensity(a, x), DensityScale(a) / a * Series(a, x))
            : Tails.Complement(Tails.Scaled(LogDensity(a, x), DensityScale(a) * Fraction(a, x)).Value);
    }

    /// <summary>The x with Q(a, x) = p.</summary>
    public static double UpperQuantile(double a, Probability p)
    {
        if (p.IsMissing)
            return double.NaN;
        if (p.Value >= 1)
            return 0;
        if (double.IsNegativeInfinity(p.Log10))
            return double.PositiveInfinity;
        return p.Value <= 0.5 ? FromUpper(a, Tails.NaturalLog(p)) : FromLower(a, LogOnePlus.Of(-p.Value));
    }

    // log Q is nearly linear in x with slope −1 far out: Newton's method in x.
    private static double FromUpper(double a, double logTail)
    {
        double x = Math.Max(WilsonHilferty(a, StandardNormal.RoughUpperQuantile(logTail)), 1e-3 * a);
        for (int i = 0; i < 200; i++)
        {
            Probability tail = Upper(a, x);
            double logHazard = LogDensity(a, x) + Math.Log(DensityScale(a) / x) - Tails.NaturalLog(tail);
            double next = Math.Max(x + (Tails.NaturalLog(tail) - logTail) / Math.Exp(logHazard), 0.125 * x);
            bool found = Math.Abs(next - x) <= 1e-9 * x;
            x = next;
            if (found)
                break;
        }
        return x;
    }

    // log P is nearly linear in log x with slope a near 0: Newton's method in log x, which is concave there.
    private static double FromLower(double a, double logTail)
    {
        double normal = WilsonHilferty(a, -StandardNormal.RoughUpperQuantile(logTail));
        double logX = normal > 0.05 * a ? Math.Log(normal) : (logTail + LogGamma.Of(a + 1)) / a;
        for (int i = 0; i < 200; i++)
        {
            double x = Math.Exp(logX);
            if (x == 0)
                break;
            double logCurrent = Tails.NaturalLog(Lower(a, x));
            double slope = Math.Exp(LogDensity(a, x) + Math.Log(DensityScale(a)) - logCurrent);
            double step = (logTail - logCurrent) / slope;
            logX += step;
            if (Math.Abs(step) <= 1e-9)
                break;
        }
        return Math.Exp(logX);
    }

    private static double WilsonHilferty(double a, double z)
    {
        double root = 1 - 1 / (9 * a) + z / (3 * Math.Sqrt(a));
        return root > 0 ? a * root * root * root : 0;
    }

    private static bool UpperIsComplement(double a, double x) => x < Math.Max(a, 1);

    // log of x^a·e^−x/Γ(a) without the factor DensityScale.
    private static double LogDensity(double a, double x)
    {
        double u = (x - a) / a;
        double deviance = Math.Abs(u) < 0.5 ? a * LogOnePlus.MinusArgument(u) : a * Math.Log(x / a) - (x - a);
        return deviance - StirlingCorrection.Of(a);
    }

    private static double DensityScale(double a) => StandardNormal.DensityAtZero * Math.Sqrt(a);

    private static double Series(double a, double x)
    {
        double term = 1;
        double sum = 1;
        for (double n = 1; ; n++)
        {
            term *= x / (a + n);
            double longer = sum + term;
            // Negated, so that NaN ends the loop too.
            if (!(longer > sum))
                return sum;
            sum = longer;
        }
    }

    // 1/(x+1−a − 1·(1−a)/(x+3−a − 2·(2−a)/(x+5−a − ...))), evaluated by the modified Lentz method.
    private static double Fraction(double a, double x)
    {
        double partial = x + 1 - a;
        double c = double.MaxValue;
        double d = 1 / partial;
        double value = d;
        for (double n = 1; ; n++)
        {
            double numerator = n * (a - n);
            partial += 2;
            d = 1 / (partial + numerator * d);
            c = partial + numerator / c;
            double factor = c * d;
            value *= factor;
            // Negated, so that NaN ends the loop too.
            if (!(Math.Abs(factor - 1) > Close))
                return value;
        }
    }
}
