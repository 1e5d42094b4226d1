namespace MatchedSuite.Statistics.Distributions;

/// <summary>The chi-squared distribution; any df &gt; 0, also fractional.</summary>
/// <remarks>A tail is the regularized incomplete gamma function at (df/2, x/2); values below 0 have the tails of 0.</remarks>
public static class ChiSquared
{
    /// <summary>P(X &gt; x). NaN gives a missing probability.</summary>
    /// <param name="x">The statistic.</param>
    /// <param name="df">Degrees of freedom, greater than 0.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="df"/> is not greater than 0.</exception>
    public static Probability UpperTail(double x, double df)
    {
        Require.PositiveFinite(df);
        return RegularizedGamma.Upper(0.5 * df, 0.5 * x);
    }

    /// <summary>P(X &lt; x). NaN gives a missing probability.</summary>
    /// <param name="x">The statistic.</param>
    /// <param name="df">Degrees of freedom, greater than 0.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="df"/> is not greater than 0.</exception>
    public static Probability LowerTail(double x, double df)
    {
        Require.PositiveFinite(df);
        return RegularizedGamma.Lower(0.5 * df, 0.5 * x);
    }

    /// <summary>The x with P(X &gt; x) = p; 0 gives +∞, 1 gives 0, NaN gives NaN.</summary>
    /// <param name="p">Upper tail, in [0, 1].</param>
    /// <param name="df">Degrees of freedom, greater than 0.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="df"/> or <paramref name="p"/> is out of range.</exception>
    public static double UpperQuantile(double p, double df) => UpperQuantile(Tails.Checked(p), df);

    /// <summary>The x with P(X &gt; x) = p, also for a p below the smallest double.</summary>
    /// <param name="p">Upper tail.</param>
    /// <param name="df">Degrees of freedom, greater than 0.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="df"/> is not greater than 0.</exception>
    public static double UpperQuantile(Probability p, double df)
    {
        Require.PositiveFinite(df);
        return 2 * RegularizedGamma.UpperQuantile(0.5 * df, p);
    }
}
