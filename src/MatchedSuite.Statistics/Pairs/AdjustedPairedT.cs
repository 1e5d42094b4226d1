namespace MatchedSuite.Statistics.Pairs;

/// <summary>Paired t-test adjusted for covariates: is the mean difference zero between members of a pair who do not differ in them?</summary>
/// <remarks>
/// <para>The differences are regressed on a constant and the covariate differences (not centred). The constant is the adjusted mean
/// difference, endpoint unit; Student's t with n − 1 − k degrees of freedom, k covariates. Effect size: adjusted mean over the
/// residual deviation times Hedges' correction; NaN for one degree of freedom. Without covariates it is the paired t.</para>
/// <para>A covariate equal within every pair, or that follows from those before it, is left out and the result remarks
/// <see cref="Remarks.CollinearCovariate"/>; <see cref="FirstCollinear"/> says which. Where the covariates determine the constant (one differs
/// by the same amount in every pair) nothing can be told: <see cref="Outcome.Collinear"/>.</para>
/// <para>Assumes independent pairs, a linear effect of each covariate's difference, near-normal residuals of equal spread. Source: Draper
/// and Smith (1998), Applied Regression Analysis. Worked through in docs/methods/paired-t.md.</para>
/// </remarks>
public static class AdjustedPairedT
{
    /// <summary>Tests one endpoint.</summary>
    /// <param name="sample">The endpoint with its covariates; its exposure is not used.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory of the calling thread.</param>
    /// <returns>
    /// <see cref="Outcome.TooFewSets"/> without a degree of freedom, <see cref="Outcome.Collinear"/> as said above,
    /// <see cref="Outcome.NoVariation"/> where the fit leaves rounding alone.
    /// </returns>
    /// <exception cref="ArgumentOutOfRangeException">The confidence is not strictly between 0 and 1.</exception>
    public static TestResult Run(in RegressionPairs sample, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        int n = sample.Pairs.Count;
        if (n < 2)
            return TestResult.Untested(Outcome.TooFewSets, n, 2 * n);
        if (sample.CovariateCount == 0)
            return PairedT.Run(sample.Pairs, options, scratch);

        using var frame = scratch.Open();
        Span<double> constant = frame.Doubles(n);
        constant.Fill(1);
        var fit = DifferenceRegression.On(sample, constant, scratch);
        var remarks = fit.Kept < sample.CovariateCount ? Remarks.CollinearCovariate : Remarks.None;
        if (fit.Outcome != Outcome.Tested)
            return TestResult.Untested(fit.Outcome, n, 2 * n, remarks);
        return StudentTest.Of(fit.Coefficient, fit.Error, fit.DegreesOfFreedom, options) with
        {
            Sets = n,
            Samples = 2 * n,
            EffectSize = HedgesCorrection.Factor(fit.DegreesOfFreedom) * fit.Coefficient / fit.Deviation,
            Remarks = remarks,
        };
    }

    /// <summary>The first covariate that is equal within every pair or follows from those before it, counted from 0; −1 where none does.</summary>
    public static int FirstCollinear(in RegressionPairs sample, Scratch scratch) => DifferenceRegression.FirstDependent(sample, scratch);
}
