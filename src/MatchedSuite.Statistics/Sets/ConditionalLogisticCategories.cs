namespace MatchedSuite.Statistics.Sets;

/// <summary>Conditional logistic regression on an endpoint with unordered levels: does any level differ from the first?</summary>
/// <remarks>
/// <para>One indicator column for every level but the first, which is the baseline; covariates are adjusted for. The omnibus
/// test is the likelihood ratio of all indicators together, its degrees of freedom the number of levels that occur and differ
/// within sets, less one. There is no single estimate; the fit hands out one log odds ratio a level.</para>
/// <para>Source: Breslow and Day (1980), Statistical Methods in Cancer Research I, ch. VII. Worked through in
/// docs/methods/conditional-logistic.md; the trend over ordered levels is <see cref="ConditionalLogistic"/> on their codes.</para>
/// </remarks>
public static class ConditionalLogisticCategories
{
    /// <summary>Tests all levels together; sides play no part.</summary>
    /// <param name="sets">The endpoint's codes on its sets, with covariates if any.</param>
    /// <param name="levels">The codes that may occur, the baseline first; at least two.</param>
    /// <param name="options">Confidence.</param>
    /// <param name="scratch">Working memory of this thread.</param>
    /// <exception cref="ArgumentException">There are fewer than two levels, or a value is none of them.</exception>
    public static TestResult Run(in SetSample sets, ReadOnlySpan<double> levels, TestOptions options, Scratch scratch)
    {
        using Scratch.Frame frame = scratch.Open();
        int columns = sets.CovariateCount + levels.Length - 1;
        ConditionalLogisticFit fit = Fit(
            sets, levels, options, scratch, frame.Doubles(Math.Max(0, columns)), frame.Doubles(Math.Max(0, columns)));
        if (fit.Outcome != Outcome.Tested)
            return TestResult.Untested(fit.Outcome, fit.Sets, fit.Samples, fit.Remarks);
        return new TestResult
        {
            Sets = fit.Sets,
            Samples = fit.Samples,
            Statistic = fit.LikelihoodRatio.Statistic,
            DegreesOfFreedom = fit.LikelihoodRatio.DegreesOfFreedom,
            P = fit.LikelihoodRatio.P,
            Remarks = fit.Remarks,
        };
    }

    /// <summary>Fits one coefficient a level and keeps the log-likelihoods and all three omnibus tests.</summary>
    /// <param name="sets">The endpoint's codes on its sets, with covariates if any.</param>
    /// <param name="levels">The codes that may occur, the baseline first; at least two.</param>
    /// <param name="options">Confidence.</param>
    /// <param name="scratch">Working memory of this thread.</param>
    /// <param name="coefficients">
    /// Receives the log odds ratios: the covariates in their order, then the levels from the second on; NaN for a level that
    /// does not occur, infinite for one that separates the roles.
    /// </param>
    /// <param name="standardErrors">Receives their standard errors in the same order.</param>
    /// <exception cref="ArgumentException">Fewer than two levels, a value that is none of them, or receivers of another length.</exception>
    public static ConditionalLogisticFit Fit(
        in SetSample sets,
        ReadOnlySpan<double> levels,
        TestOptions options,
        Scratch scratch,
        Span<double> coefficients,
        Span<double> standardErrors)
    {
        if (levels.Length < 2)
            throw new ArgumentException($"There must be at least two levels; there are {levels.Length}.");
        int columns = sets.CovariateCount + levels.Length - 1;
        Require.OneEntryAColumn(coefficients.Length, columns);
        Require.OneEntryAColumn(standardErrors.Length, columns);
        if (sets.Sets == 0)
            return new ConditionalLogisticFit { Outcome = Outcome.TooFewSets, Remarks = Remarks.TooFewSets };

        using Scratch.Frame frame = scratch.Open();
        Span<double> design = frame.Doubles(columns * sets.Members);
        sets.Covariates.CopyTo(design);
        Span<double> indicators = design[sets.Covariates.Length..];
        indicators.Clear();
        for (int member = 0; member < sets.Members; member++)
        {
            int level = levels.IndexOf(sets.Values[member]);
            if (level < 0)
                throw new ArgumentException($"The value {sets.Values[member]} is none of the {levels.Length} levels.");
            if (level > 0)
                indicators[((level - 1) * sets.Members) + member] = 1;
        }

        var model = new ConditionalModel(sets, design, sets.CovariateCount, columns, frame);
        return model.Fit(options, ConditionalInterval.Wald, coefficients, standardErrors) with { Sets = sets.Sets, Samples = sets.Members };
    }
}
