namespace MatchedSuite.Statistics.Pairs;

/// <summary>Within-pair slope: does the endpoint differ between the members of a pair as their measured exposure does?</summary>
/// <remarks>
/// <para>Endpoint differences are regressed on exposure differences, and covariate differences if any, through the origin: a pair without
/// a difference in exposure is expected to show none in the endpoint. Everything that the members share cancels. Estimate: endpoint
/// units per unit of exposure; Student's t with n − 1 − k degrees of freedom, k covariates. Which member comes first changes
/// nothing. Effect size: partial correlation t/√(t² + df).</para>
/// <para>Covariates that follow from others are left out as in <see cref="AdjustedPairedT"/>.</para>
/// <para>Assumes independent pairs, a linear effect, residuals of equal spread, near-normal or from many pairs. Source: Carlin, Gurrin, Sterne,
/// Morley and Dwyer (2005), International Journal of Epidemiology 34, 1089-1099. Worked through in docs/methods/within-pair-slope.md.</para>
/// </remarks>
public static class WithinPairSlope
{
    /// <summary>Tests one endpoint.</summary>
    /// <param name="sample">The endpoint with its exposure, and covariates if any.</param>
    /// <param name="options">Sides (of the slope) and confidence.</param>
    /// <param name="scratch">Working memory of the calling thread.</param>
    /// <returns>
    /// <see cref="Outcome.TooFewSets"/> without a degree of freedom, <see cref="Outcome.NothingDiffers"/> where no pair differs in exposure,
    /// <see cref="Outcome.Collinear"/> where the covariates determine the exposure, <see cref="Outcome.NoVariation"/> where the fit
    /// leaves rounding alone.
    /// </returns>
    /// <exception cref="ArgumentException">The sample has no exposure.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The confidence is not strictly between 0 and 1.</exception>
    public static TestResult Run(in RegressionPairs sample, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        int n = sample.Pairs.Count;
        Require.SameLength(sample.Pairs.Differences, sample.Exposure);
        if (n < 2)
            return TestResult.Untested(Outcome.TooFewSets, n, 2 * n);
        if (!sample.Exposure.ContainsAnyExcept(0.0))
            return TestResult.Untested(Outcome.NothingDiffers, n, 2 * n);

        var fit = DifferenceRegression.On(sample, sample.Exposure, scratch);
        var remarks = fit.Kept < sample.CovariateCount ? Remarks.CollinearCovariate : Remarks.None;
        if (fit.Outcome != Outcome.Tested)
            return TestResult.Untested(fit.Outcome, n, 2 * n, remarks);
        var result = StudentTest.Of(fit.Coefficient, fit.Error, fit.DegreesOfFreedom, options);
        double t = result.Statistic;
        return result with
        {
            Sets = n,
            Samples = 2 * n,
            EffectSize = t / Math.Sqrt((t * t) + fit.DegreesOfFreedom),
            Remarks = remarks,
        };
    }
}
