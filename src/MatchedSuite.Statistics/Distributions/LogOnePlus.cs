namespace MatchedSuite.Statistics.Distributions;

/// <summary>log(1 + x) and its relatives with all digits near x = 0, where the plain formulas lose them.</summary>
internal static class LogOnePlus
{
    // Beyond this the series is slower than the logarithm and the subtraction loses less than a digit.
    private const double SeriesReach = 0.5;

    /// <summary>log(1 + x), x &gt; −1, to a few units of the last digit.</summary>
    /// <remarks>Kahan's correction: the rounding of 1 + x is divided out again.</remarks>
    public static double Of(double x)
    {
        double rounded = 1 + x;
        if (rounded == 1)
            return x;
        return double.IsPositiveInfinity(rounded) ? rounded : Math.Log(rounded) * (x / (rounded - 1));
    }

    /// <summary>log(1 + x) − x, never positive; about −x²/2 near 0.</summary>
    /// <remarks>With r = x/(2 + x): log(1 + x) = 2·artanh(r), and 2r − x = −x·r holds exactly.</remarks>
    public static double MinusArgument(double x)
    {
        if (Math.Abs(x) > SeriesReach)
            return Of(x) - x;
        double r = x / (2 + x);
        double square = r * r;
        double power = 2 * r * square;
        double sum = -x * r;
        for (int odd = 3; ; odd += 2)
        {
            double longer = sum + power / odd;
            // Negated, so that NaN ends the loop too.
            if (!(longer < sum || longer > sum))
                return sum;
            sum = longer;
            power *= square;
        }
    }

    /// <summary>exp(x) − 1, to a few units of the last digit.</summary>
    public static double Inverse(double x)
    {
        double power = Math.Exp(x);
        if (power == 1)
            return x;
        double less = power - 1;
        if (less == -1 || power > 1e17)
            return less;
        return less * (x / Math.Log(power));
    }
}
