namespace MatchedSuite.Statistics.Pairs;

/// <summary>One endpoint on complete pairs together with the within-pair differences it is regressed on.</summary>
/// <remarks>
/// Every difference is index minus reference, in the order of the pairs, finite. Covariates lie column after column, each with
/// one difference a pair.
/// </remarks>
public readonly ref struct RegressionPairs
{
    private RegressionPairs(in PairSample pairs, ReadOnlySpan<double> exposure, ReadOnlySpan<double> covariates, int covariateCount)
    {
        Pairs = pairs;
        Exposure = exposure;
        Covariates = covariates;
        CovariateCount = covariateCount;
    }

    /// <summary>The endpoint.</summary>
    public PairSample Pairs { get; }

    /// <summary>Differences of the exposure, in its unit; empty where the index role itself is the exposure.</summary>
    public ReadOnlySpan<double> Exposure { get; }

    /// <summary>Differences of all covariates, column after column.</summary>
    public ReadOnlySpan<double> Covariates { get; }

    /// <summary>Number of covariates.</summary>
    public int CovariateCount { get; }

    /// <summary>Differences of one covariate.</summary>
    /// <param name="column">Which one, counted from 0 in the order they were handed over.</param>
    public ReadOnlySpan<double> Covariate(int column) => Covariates.Slice(column * Pairs.Count, Pairs.Count);

    /// <summary>An endpoint with covariates beside the two roles.</summary>
    /// <param name="pairs">The endpoint on the pairs whose covariates are all there.</param>
    /// <param name="covariates">Covariate differences, column after column; may be empty.</param>
    /// <exception cref="ArgumentException">The covariates are not whole columns.</exception>
    public static RegressionPairs WithCovariates(in PairSample pairs, ReadOnlySpan<double> covariates) =>
        new(pairs, [], covariates, Require.WholeColumns(covariates, pairs.Count));

    /// <summary>An endpoint with a measured exposure, and covariates if any.</summary>
    /// <param name="pairs">The endpoint on the pairs whose exposure and covariates are all there; which member is the index one is arbitrary.</param>
    /// <param name="exposure">Exposure differences, one a pair.</param>
    /// <param name="covariates">Covariate differences, column after column; may be empty.</param>
    /// <exception cref="ArgumentException">The lengths do not fit together.</exception>
    public static RegressionPairs WithExposure(in PairSample pairs, ReadOnlySpan<double> exposure, ReadOnlySpan<double> covariates)
    {
        Require.SameLength(pairs.Differences, exposure);
        return new(pairs, exposure, covariates, Require.WholeColumns(covariates, pairs.Count));
    }
}
