namespace MatchedSuite.Statistics.Distributions;

/// <summary>Fisher's F distribution; any df &gt; 0, also fractional; infinite df2 gives the chi-squared distribution over df1.</summary>
/// <remarks>The upper tail is I_x(df2/2, df1/2) at x = df2/(df2 + df1·f); values below 0 have the tails of 0.</remarks>
public static class FisherF
{
    /// <summary>P(F &gt; f). NaN gives a missing probability.</summary>
    /// <param name="f">The variance ratio.</param>
    /// <param name="df1">Degrees of freedom of the numerator, greater than 0, finite.</param>
    /// <param name="df2">Degrees of freedom of the denominator, greater than 0, or +∞.</param>
    /// <exception cref="ArgumentOutOfRangeException">Degrees of freedom are out of range.</exception>
    public static Probability UpperTail(double f, double df1, double df2)
    {
        CheckDegrees(df1, df2);
        if (double.IsNaN(f))
            return Probability.Missing;
        if (f <= 0)
            return Probability.One;
        if (double.IsPositiveInfinity(f))
            return Probability.Zero;
        return double.IsPositiveInfinity(df2)
            ? ChiSquared.UpperTail(f * df1, df1)
            : RegularizedBeta.Lower(0.5 * df2, 0.5 * df1, BetaPoint.AtVarianceRatio(f, df1, df2));
    }

    /// <summary>P(F &lt; f). NaN gives a missing probability.</summary>
    /// <param name="f">The variance ratio.</param>
    /// <param name="df1">Degrees of freedom of the numerator, greater than 0, finite.</param>
    /// <param name="df2">Degrees of freedom of the denominator, greater than 0, or +∞.</param>
    /// <exception cref="ArgumentOutOfRangeException">Degrees of freedom are out of range.</exception>
    public static Probability LowerTail(double f, double df1, double df2)
    {
        CheckDegrees(df1, df2);
        if (double.IsNaN(f))
            return Probability.Missing;
        if (f <= 0)
            return Probability.Zero;
        if (double.IsPositiveInfinity(f))
            return Probability.One;
        return double.IsPositiveInfinity(df2)
            ? ChiSquared.LowerTail(f * df1, df1)
            : RegularizedBeta.Upper(0.5 * df2, 0.5 * df1, BetaPoint.AtVarianceRatio(f, df1, df2));
    }

    /// <summary>The f with P(F &gt; f) = p; 0 gives +∞, 1 gives 0, NaN gives NaN.</summary>
    /// <param name="p">Upper tail, in [0, 1].</param>
    /// <param name="df1">Degrees of freedom of the numerator, greater than 0, finite.</param>
    /// <param name="df2">Degrees of freedom of the denominator, greater than 0, or +∞.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="p"/> or degrees of freedom are out of range.</exception>
    public static double UpperQuantile(double p, double df1, double df2) => UpperQuantile(Tails.Checked(p), df1, df2);

    /// <summary>The f with P(F &gt; f) = p, also for a p below the smallest double; +∞ where f is above the largest.</summary>
    /// <param name="p">Upper tail.</param>
    /// <param name="df1">Degrees of freedom of the numerator, greater than 0, finite.</param>
    /// <param name="df2">Degrees of freedom of the denominator, greater than 0, or +∞.</param>
    /// <exception cref="ArgumentOutOfRangeException">Degrees of freedom are out of range.</exception>
    public static double UpperQuantile(Probability p, double df1, double df2)
    {
        CheckDegrees(df1, df2);
        if (p.IsMissing)
            return double.NaN;
        if (p.Value >= 1)
            return 0;
        if (double.IsNegativeInfinity(p.Log10))
            return double.PositiveInfinity;
        if (double.IsPositiveInfinity(df2))
            return ChiSquared.UpperQuantile(p, df1) / df1;
        double logOdds = p.Value <= 0.5
            ? RegularizedBeta.LowerLogOdds(Tails.NaturalLog(p), 0.5 * df2, 0.5 * df1)
            : RegularizedBeta.UpperLogOdds(LogOnePlus.Of(-p.Value), 0.5 * df2, 0.5 * df1);
        return Math.Exp(-logOdds) * (df2 / df1);
    }

    private static void CheckDegrees(double df1, double df2)
    {
        Require.PositiveFinite(df1);
        Require.Positive(df2);
    }
}
