namespace MatchedSuite.Statistics.Pairs;

/// <summary>Wilcoxon's signed-rank test: do the differences lie symmetrically about zero?</summary>
/// <remarks>
/// <para>Statistic: sum of the ranks of positive differences, the sizes ranked without zeros, midranks for decimal ties. No
/// degrees of freedom, no standard error.</para>
/// <para>The null distribution is exact given the observed midranks for up to <see cref="LargestExactWithTies"/> non-zero
/// differences, and without ties up to <see cref="LargestExactWithoutTies"/>; beyond it is normal, with the variance
/// corrected for ties and a continuity correction of ½.</para>
/// <para>Estimate, in the endpoint's unit: Hodges–Lehmann over all differences, zeros kept. The limits are order statistics of
/// the Walsh averages by the null distribution without ties, exact where the test is; so without ties and zeros the
/// interval excludes 0 exactly when p &lt; 1 − confidence. Effect size: rank-biserial correlation, positive minus negative rank
/// sum over their total.</para>
/// <para>Assumes independent pairs, and for the estimate a symmetric distribution of differences.</para>
/// <para>Sources: Wilcoxon (1945), Biometrics Bulletin 1, 80-83; Hodges and Lehmann (1963), Annals of Mathematical
/// Statistics 34, 598-611; Kerby (2014), Comprehensive Psychology 3, 11.IT.3.1. Worked through in docs/methods/signed-rank.md.</para>
/// </remarks>
public static class SignedRank
{
    /// <summary>Most non-zero differences for which tied ranks are enumerated.</summary>
    public const int LargestExactWithTies = 50;

    /// <summary>Most non-zero differences for which untied ranks are enumerated.</summary>
    public const int LargestExactWithoutTies = SignedRankNull.LargestN;

    /// <summary>Tests one endpoint.</summary>
    /// <param name="pairs">The complete pairs; at least one is needed.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory of the calling thread.</param>
    /// <returns><see cref="Outcome.TooFewSets"/> without pairs, <see cref="Outcome.NothingDiffers"/> where all differences are zero.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The confidence is not strictly between 0 and 1.</exception>
    public static TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        int n = pairs.Count;
        if (n == 0)
            return TestResult.Untested(Outcome.TooFewSets, 0, 0);

        using var frame = scratch.Open();
        var ranks = SignedRanks.Of(pairs, frame);
        if (ranks.Ranked == 0)
            return TestResult.Untested(Outcome.NothingDiffers, n, 2 * n, Remarks.Zeros);

        bool isExact = ranks.Ranked <= (ranks.HasTies ? LargestExactWithTies : LargestExactWithoutTies);
        var tails = isExact ? ExactTails(ranks, scratch) : SignedRankNormal.Tails(Sum(ranks), ranks.Ranked, 0, ranks.TieTerm);
        return SignedRankResult.Of(ranks, isExact, Sum(ranks), (double)ranks.Ranked * (ranks.Ranked + 1) / 4, tails, options, scratch);
    }

    private static double Sum(in SignedRanks ranks) => 0.5 * ranks.DoubledPositiveSum;

    private static (Probability Lower, Probability Upper) ExactTails(in SignedRanks ranks, Scratch scratch)
    {
        if (ranks.HasTies)
            return ConditionalRankSum.Tails(ranks.DoubledRanks, ranks.DoubledPositiveSum, scratch);
        var untied = SignedRankNull.Of(ranks.Ranked);
        long sum = ranks.DoubledPositiveSum / 2;
        return (untied.AtMost(sum), untied.AtLeast(sum));
    }
}
