namespace MatchedSuite.Statistics.Sets;

/// <summary>The estimate of <see cref="WithinSetLinear"/> with a standard error that lets sets differ in spread and members of a set be related.</summary>
/// <remarks>
/// <para>Cluster-robust variance over the S sets with the factor S/(S − 1) (CR1), t with S − 1 degrees of freedom. Estimate,
/// standard error and interval are in the endpoint's unit. On 1:1 sets without covariates it is the paired t-test, exactly.</para>
/// <para>Assumes independent sets, and many of them: with few the standard error is too small.</para>
/// <para>Sources: Liang and Zeger (1986), Biometrika 73(1), 13-22; Cameron and Miller (2015), Journal of Human Resources 50(2),
/// 317-372. Worked through in docs/methods/within-set-robust.md.</para>
/// </remarks>
public static class WithinSetRobust
{
    // Scores this small beside the estimate are rounding: every set shows the same difference.
    private const double FlatRatio = 1e-13;

    /// <summary>Tests one endpoint.</summary>
    /// <param name="sets">The endpoint on its sets, with covariates if any.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory of this thread.</param>
    /// <returns>As <see cref="WithinSetLinear.Run"/>; also <see cref="Outcome.TooFewSets"/> for fewer than two sets.</returns>
    public static TestResult Run(in SetSample sets, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        if (sets.Sets < 2)
            return TestResult.Untested(Outcome.TooFewSets, sets.Sets, sets.Members);
        using Scratch.Frame frame = scratch.Open();
        WithinSetRegression fit = WithinSetRegression.Of(sets, frame);
        double error = fit.Outcome == Outcome.Tested ? fit.RobustStandardError : 0;
        if (fit.Outcome != Outcome.Tested || error <= FlatRatio * (Math.Abs(fit.Estimate) + fit.ResidualDeviation))
        {
            Outcome outcome = fit.Outcome == Outcome.Tested ? Outcome.NoVariation : fit.Outcome;
            return TestResult.Untested(outcome, sets.Sets, sets.Members, fit.Remarks);
        }

        return fit.Test(sets, options, error, sets.Sets - 1);
    }
}
