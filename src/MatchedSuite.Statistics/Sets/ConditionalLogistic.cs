namespace MatchedSuite.Statistics.Sets;

/// <summary>Conditional logistic regression: does the endpoint differ between the roles within matched sets?</summary>
/// <remarks>
/// <para>Shape: one value a member, any numbers of index and reference members a set (1:1, 1:M, N:M); covariates are adjusted for.</para>
/// <para>Model: within a set the log odds of the index role rise by β a unit of the endpoint; the exact conditional likelihood
/// given the number of index members is maximised. The estimate is β, the log odds ratio per unit (binary: present against
/// absent; ordinal: per step of the codes). The statistic is Wald's z.</para>
/// <para>Where the endpoint separates the roles no finite maximum exists: the result is marked separated, the estimate is
/// infinite, the interval comes from the profile likelihood, and statistic and p-value are the signed root of the
/// likelihood ratio.</para>
/// <para>Assumes independent sets and a linear effect on the log odds. Sources: Breslow and Day (1980), Statistical Methods in
/// Cancer Research I, ch. VII; Gail, Lubin and Rubinstein (1981), Biometrika 68(3), 703-707. Worked through in
/// docs/methods/conditional-logistic.md.</para>
/// </remarks>
public static class ConditionalLogistic
{
    /// <summary>Tests one endpoint.</summary>
    /// <param name="sets">The endpoint on its sets, with covariates if any.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory of this thread.</param>
    public static TestResult Run(in SetSample sets, TestOptions options, Scratch scratch) => Fit(sets, options, scratch).Test(options.Sides);

    /// <summary>Fits one endpoint and keeps the log-likelihoods and all three tests.</summary>
    /// <param name="sets">The endpoint on its sets, with covariates if any.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory of this thread.</param>
    public static ConditionalLogisticFit Fit(in SetSample sets, TestOptions options, Scratch scratch)
    {
        using Scratch.Frame frame = scratch.Open();
        int columns = sets.CovariateCount + 1;
        return Fit(sets, options, scratch, ConditionalInterval.Wald, frame.Doubles(columns), frame.Doubles(columns));
    }

    /// <summary>Fits one endpoint and hands out every coefficient.</summary>
    /// <param name="sets">The endpoint on its sets, with covariates if any.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory of this thread.</param>
    /// <param name="coefficients">Receives log odds ratios per unit: the covariates in their order, then the endpoint.</param>
    /// <param name="standardErrors">Receives their standard errors in the same order.</param>
    /// <exception cref="ArgumentException">A receiver has not one entry for each covariate and one for the endpoint.</exception>
    public static ConditionalLogisticFit Fit(
        in SetSample sets, TestOptions options, Scratch scratch, Span<double> coefficients, Span<double> standardErrors)
    {
        Require.OneEntryAColumn(coefficients.Length, sets.CovariateCount + 1);
        Require.OneEntryAColumn(standardErrors.Length, sets.CovariateCount + 1);
        return Fit(sets, options, scratch, ConditionalInterval.Wald, coefficients, standardErrors);
    }

    /// <summary>The profile-likelihood interval of the log odds ratio per unit; an end is infinite where the roles are separated.</summary>
    /// <param name="sets">The endpoint on its sets, with covariates if any.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory of this thread.</param>
    public static Interval ProfileInterval(in SetSample sets, TestOptions options, Scratch scratch)
    {
        using Scratch.Frame frame = scratch.Open();
        int columns = sets.CovariateCount + 1;
        return Fit(sets, options, scratch, ConditionalInterval.Profile, frame.Doubles(columns), frame.Doubles(columns)).Interval;
    }

    private static ConditionalLogisticFit Fit(
        in SetSample sets,
        TestOptions options,
        Scratch scratch,
        ConditionalInterval interval,
        Span<double> coefficients,
        Span<double> standardErrors)
    {
        Require.OpenUnitInterval(options.Confidence);
        if (sets.Sets == 0)
            return new ConditionalLogisticFit { Outcome = Outcome.TooFewSets, Remarks = Remarks.TooFewSets };
        using Scratch.Frame frame = scratch.Open();
        ReadOnlySpan<double> design = sets.Values;
        if (sets.CovariateCount > 0)
        {
            Span<double> all = frame.Doubles(sets.Covariates.Length + sets.Members);
            sets.Covariates.CopyTo(all);
            sets.Values.CopyTo(all[sets.Covariates.Length..]);
            design = all;
        }

        var model = new ConditionalModel(sets, design, sets.CovariateCount, sets.CovariateCount + 1, frame);
        return model.Fit(options, interval, coefficients, standardErrors) with { Sets = sets.Sets, Samples = sets.Members };
    }
}
