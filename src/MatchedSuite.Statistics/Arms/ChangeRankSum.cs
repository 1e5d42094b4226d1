using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Arms;

/// <summary>Wilcoxon–Mann–Whitney test on changes: do the changes of one arm tend to be larger?</summary>
/// <remarks>
/// <para>Statistic: U, the number of pairs of subjects in which the index arm's change is the larger, ties counting ½. The
/// null distribution is exact without ties up to 50 subjects in both arms together, else normal with the variance corrected
/// for ties and a continuity correction of ½.</para>
/// <para>Estimate, in the endpoint's unit: the Hodges–Lehmann shift, the median of all differences between a change of the
/// index arm and one of the reference arm; the limits are order statistics of those differences by the null without ties,
/// exact where the test is, so without ties the interval excludes 0 exactly when p &lt; 1 − confidence. Effect size:
/// rank-biserial correlation, 2U/(n₁n₂) − 1.</para>
/// <para>Assumes independent subjects; for the estimate, changes of the same shape in both arms.</para>
/// <para>Sources: Wilcoxon (1945), Biometrics Bulletin 1, 80-83; Mann &amp; Whitney (1947), Annals of Mathematical Statistics 18,
/// 50-60; Hodges &amp; Lehmann (1963), same journal 34, 598-611. Worked through in docs/methods/change-rank-sum.md.</para>
/// </remarks>
public static class ChangeRankSum
{
    /// <summary>Tests one endpoint; at least one subject an arm is needed.</summary>
    public static TestResult Run(in ArmSample sample, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        int first = sample.IndexCount, second = sample.ReferenceCount, n = sample.Count;
        if (Math.Min(first, second) == 0)
            return TestResult.Untested(Outcome.TooFewSets, n, 2 * n);
        using var frame = scratch.Open();
        var ranks = PooledRanks.Of(sample, frame);
        double all = n;
        if (ranks.TieTerm == all * all * all - all)
            return TestResult.Untested(Outcome.NothingDiffers, n, 2 * n, Remarks.Ties);

        bool isExact = ranks.TieTerm == 0 && n <= MannWhitneyNull.LargestExact;
        double u = 0.5 * ranks.DoubledU;
        Probability lower, upper, smallest = Probability.Missing;
        long quantile;
        if (isExact)
        {
            var counts = MannWhitneyNull.Counts(first, second, frame);
            (lower, upper) = MannWhitneyNull.Tails(counts, (int)u);
            quantile = MannWhitneyNull.LowerQuantile(counts, options.TailShare);
            var end = MannWhitneyNull.Tails(counts, 0).Lower;
            smallest = options.Sides == Sides.Two ? end.Times(2) : end;
        }
        else
        {
            (lower, upper) = MannWhitneyNull.NormalTails(u, first, second, ranks.TieTerm);
            quantile = MannWhitneyNull.NormalLowerQuantile(first, second, options.TailShare);
        }

        var (estimate, low, high) = ShiftOfChanges.Of(ranks.IndexSorted, ranks.ReferenceSorted, quantile, scratch);
        return new TestResult
        {
            Sets = n,
            Samples = 2 * n,
            Estimate = estimate,
            Interval = Interval.Pointing(low, high, options.Sides),
            Statistic = u,
            P = Tails.ForSides(options.Sides, lower, upper),
            EffectSize = 2 * u / ((double)first * second) - 1,
            SmallestPossibleP = smallest,
            Remarks = (ranks.TieTerm > 0 ? Remarks.Ties : 0) | (isExact ? Remarks.Exact : 0) | (quantile == 0 ? Remarks.WideAsData : 0),
        };
    }
}
