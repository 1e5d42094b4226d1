namespace MatchedSuite.Statistics.Distributions;

/// <summary>The normal distribution with mean 0 and standard deviation 1.</summary>
/// <remarks>It is Student's t with infinite df, and is computed as that.</remarks>
public static class StandardNormal
{
    /// <summary>1/√(2π), the density at 0.</summary>
    internal const double DensityAtZero = 0.39894228040143267794;

    /// <summary>P(Z &gt; z). NaN gives a missing probability.</summary>
    public static Probability UpperTail(double z) => StudentT.UpperTail(z, double.PositiveInfinity);

    /// <summary>P(Z &lt; z). NaN gives a missing probability.</summary>
    public static Probability LowerTail(double z) => StudentT.LowerTail(z, double.PositiveInfinity);

    /// <summary>The z with P(Z &gt; z) = p, also for a p below the smallest double.</summary>
    public static double UpperQuantile(Probability p) => StudentT.UpperQuantile(p, double.PositiveInfinity);

    /// <summary>The z with P(Z &gt; z) = p; 0 gives +∞, 1 gives −∞, NaN gives NaN.</summary>
    /// <param name="p">Upper tail, in [0, 1].</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="p"/> is out of range.</exception>
    public static double UpperQuantile(double p) => StudentT.UpperQuantile(p, double.PositiveInfinity);

    /// <summary>Density at z.</summary>
    public static double Density(double z) => DensityAtZero * Math.Exp(-0.5 * z * z);

    /// <summary>A quantile good to about three digits, to start from; Abramowitz and Stegun (1964) 26.2.23.</summary>
    /// <param name="logTail">Natural logarithm of an upper tail of at most ½.</param>
    internal static double RoughUpperQuantile(double logTail)
    {
        double r = Math.Sqrt(-2 * logTail);
        return r - (2.515517 + r * (0.802853 + r * 0.010328)) / (1 + r * (1.432788 + r * (0.189269 + r * 0.001308)));
    }
}
