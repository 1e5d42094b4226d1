using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>What the variances of many endpoints have in common: d0·s0²/σ² is chi-squared with d0 degrees of freedom over the endpoints.</summary>
/// <remarks>
/// Source: Smyth (2004), Statistical Applications in Genetics and Molecular Biology 3:3, section 6.2.
/// </remarks>
/// <param name="DegreesOfFreedom">d0: what the common variance is worth; +∞ where the endpoints' variances scatter no more than chance makes them.</param>
/// <param name="Variance">s0²: the common variance, in squared endpoint units.</param>
public readonly record struct VariancePrior(double DegreesOfFreedom, double Variance)
{
    /// <summary>Fewest endpoints from which a common variance is learnt.</summary>
    public const int FewestEndpoints = 10;

    /// <summary>Fits the prior by the moments of log s² over the endpoints of a family.</summary>
    /// <remarks>
    /// With e = log s² − ψ(df/2) + log(df/2), the mean of e and what its variance exceeds the mean of ψ'(df/2) give s0² and d0. Sums run in
    /// the order given.
    /// </remarks>
    /// <param name="variances">One variance an endpoint, all in the same unit or without unit; NaN where the endpoint has none.</param>
    /// <param name="degreesOfFreedom">Degrees of freedom of each, greater than 0 where there is a variance.</param>
    /// <returns>Null for fewer than <see cref="FewestEndpoints"/> variances.</returns>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    /// <exception cref="ArgumentOutOfRangeException">A variance or its degrees of freedom are not positive and finite.</exception>
    public static VariancePrior? Fit(ReadOnlySpan<double> variances, ReadOnlySpan<double> degreesOfFreedom)
    {
        Require.SameLength(variances, degreesOfFreedom);
        int endpoints = 0;
        double mean = 0, squares = 0, expected = 0;
        for (int i = 0; i < variances.Length; i++)
        {
            if (double.IsNaN(variances[i]))
                continue;
            Require.PositiveFinite(variances[i], nameof(variances));
            Require.PositiveFinite(degreesOfFreedom[i], nameof(degreesOfFreedom));
            double half = 0.5 * degreesOfFreedom[i];
            double e = Math.Log(variances[i]) - PolyGamma.DigammaLessLog(half);
            double step = e - mean;
            mean += step / ++endpoints;
            squares += step * (e - mean);
            expected += PolyGamma.Trigamma(half);
        }

        if (endpoints < FewestEndpoints)
            return null;
        double excess = (squares / (endpoints - 1)) - (expected / endpoints);
        if (!(excess > 0))
            return new VariancePrior(double.PositiveInfinity, Math.Exp(mean));
        double halfPrior = PolyGamma.InverseTrigamma(excess);
        return new VariancePrior(2 * halfPrior, Math.Exp(mean + PolyGamma.DigammaLessLog(halfPrior)));
    }

    /// <summary>The variance of one endpoint shrunk towards the common one: (d0·s0² + df·s²)/(d0 + df).</summary>
    /// <param name="variance">s² of the endpoint.</param>
    /// <param name="degreesOfFreedom">Its df, greater than 0.</param>
    public double Shrink(double variance, double degreesOfFreedom)
    {
        if (double.IsPositiveInfinity(DegreesOfFreedom))
            return Variance;
        double weight = DegreesOfFreedom / (DegreesOfFreedom + degreesOfFreedom);
        return (weight * Variance) + ((1 - weight) * variance);
    }
}
