namespace MatchedSuite.Statistics.Sets;

/// <summary>Linear model with a fixed effect a set: is the endpoint's mean of the index role another than that of the reference role?</summary>
/// <remarks>
/// <para>Shape: one value a member, any numbers of both roles a set; covariates are adjusted for. With N members in S sets and C
/// covariates, t has N − S − 1 − C degrees of freedom. Estimate, standard error and interval are in the endpoint's unit; effect
/// size: estimate over the residual standard deviation within sets. On 1:1 sets without covariates it is the paired t-test.</para>
/// <para>Assumes members that, once the set's level is taken off, vary alike and independently, near-normal or many.</para>
/// <para>Source: Cochran and Cox (1957), Experimental Designs, 2nd ed., ch. 4 (randomised blocks); Wooldridge (2010), Econometric
/// Analysis of Cross Section and Panel Data, 2nd ed., §10.5. Worked through in docs/methods/within-set-linear.md.</para>
/// </remarks>
public static class WithinSetLinear
{
    /// <summary>Tests one endpoint.</summary>
    /// <param name="sets">The endpoint on its sets, with covariates if any.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory of this thread.</param>
    /// <returns>
    /// <see cref="Outcome.TooFewSets"/> without a degree of freedom, <see cref="Outcome.NothingDiffers"/> where no value differs
    /// within a set, <see cref="Outcome.NoVariation"/> where the fit is exact, <see cref="Outcome.Collinear"/> where the
    /// covariates determine the role.
    /// </returns>
    public static TestResult Run(in SetSample sets, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        using Scratch.Frame frame = scratch.Open();
        WithinSetRegression fit = WithinSetRegression.Of(sets, frame);
        if (fit.Outcome != Outcome.Tested)
            return TestResult.Untested(fit.Outcome, sets.Sets, sets.Members, fit.Remarks);
        return fit.Test(sets, options, fit.StandardError, fit.DegreesOfFreedom) with { EffectSize = fit.Estimate / fit.ResidualDeviation };
    }
}
