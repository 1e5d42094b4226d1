namespace MatchedSuite.Statistics.Distributions;

/// <summary>What Stirling's formula misses: δ(x) = log Γ(x) − [(x − ½)·log x − x + ½·log 2π].</summary>
/// <remarks>
/// Ratios of gamma functions at large arguments are formed from these small corrections and a deviance, so that the large
/// terms cancel on paper and not in the last digits (Loader 2000, "Fast and accurate computation of binomial probabilities").
/// Series: Abramowitz and Stegun (1964) 6.1.41.
/// </remarks>
internal static class StirlingCorrection
{
    /// <summary>½·log 2π.</summary>
    public const double HalfLogTwoPi = 0.91893853320467274178;

    // From here eight terms of the series reach the last digit of a double.
    private const double SeriesFrom = 10;

    /// <summary>δ(x) for x &gt; 0, to about 1e-15 absolutely where log Γ(x) is moderate.</summary>
    public static double Of(double x)
    {
        if (x >= SeriesFrom)
            return Series(x);
        return LogGammaByShift(x) - ((x - 0.5) * Math.Log(x) - x + HalfLogTwoPi);
    }

    /// <summary>log Γ(x) for 0 &lt; x &lt; 10: the recurrence carries x up to where the series holds.</summary>
    public static double LogGammaByShift(double x)
    {
        double product = x;
        double shifted = x + 1;
        while (shifted < SeriesFrom)
            product *= shifted++;
        return (shifted - 0.5) * Math.Log(shifted) - shifted + HalfLogTwoPi + Series(shifted) - Math.Log(product);
    }

    /// <summary>Γ(a + ½) / (Γ(a)·√a) for a &gt; 0; tends to 1 for large a.</summary>
    /// <remarks>The difference of two Stirling series, term by term; the recurrence carries small a up without a logarithm.</remarks>
    public static double HalfStepRatio(double a)
    {
        if (double.IsPositiveInfinity(a))
            return 1;
        double carried = 1;
        double shifted = a;
        for (; shifted < SeriesFrom; shifted++)
            carried *= shifted / (shifted + 0.5);
        double inverse = 1 / shifted;
        double square = inverse * inverse;
        double exponent = inverse * (-1.0 / 8 + square * (1.0 / 192 + square * (-1.0 / 640 + square * (17.0 / 14336
            + square * (-31.0 / 18432 + square * (691.0 / 180224 + square * (-5461.0 / 425984 + square * 929569.0 / 15728640)))))));
        double ratio = carried * Math.Exp(exponent);
        return a < SeriesFrom ? ratio * Math.Sqrt(shifted / a) : ratio;
    }

    private static double Series(double x)
    {
        double inverse = 1 / x;
        double square = inverse * inverse;
        return inverse * (1.0 / 12 + square * (-1.0 / 360 + square * (1.0 / 1260 + square * (-1.0 / 1680
            + square * (1.0 / 1188 + square * (-691.0 / 360360 + square * (1.0 / 156 - square * 3617.0 / 122400)))))));
    }
}
