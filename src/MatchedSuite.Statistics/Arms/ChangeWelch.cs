using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Arms;

/// <summary>Welch's t-test on changes: do the arms change by different amounts on average?</summary>
/// <remarks>
/// <para>Estimate: mean change of the index arm minus that of the reference arm, in the endpoint's unit; the variances of the
/// arms may differ, degrees of freedom after Welch. Effect size: Hedges' g of the changes (pooled standard deviation).</para>
/// <para>Assumes independent subjects and near-normal changes, or many of them. Where arms differ at baseline,
/// <see cref="ChangeAncova"/> is the better question.</para>
/// <para>Source: Welch (1947), Biometrika 34, 28-35. Worked through in docs/methods/change-welch.md.</para>
/// </remarks>
public static class ChangeWelch
{
    /// <summary>Tests one endpoint; at least two subjects an arm are needed.</summary>
    public static TestResult Run(in ArmSample sample, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        int n = sample.Count;
        if (Math.Min(sample.IndexCount, sample.ReferenceCount) < TwoSampleT.Fewest)
            return TestResult.Untested(Outcome.TooFewSets, n, 2 * n);
        double rounding = FixedLanes.Largest(sample.Pairs.Roundings);
        return TwoSampleT.Welch(sample.IndexChanges, sample.ReferenceChanges, rounding, options, scratch) with { Sets = n, Samples = 2 * n };
    }
}
