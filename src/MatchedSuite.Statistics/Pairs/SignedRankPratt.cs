namespace MatchedSuite.Statistics.Pairs;

/// <summary>Wilcoxon's signed-rank test with Pratt's zeros: zero differences take the lowest ranks and then count on neither side.</summary>
/// <remarks>
/// <para>As <see cref="SignedRank"/>, but the smallest non-zero difference has the rank after the last zero: many zeros weaken the evidence
/// of small differences instead of vanishing. Without zeros the two tests are the same.</para>
/// <para>Statistic: sum of the ranks of positive differences. With zeros or ties the null distribution is exact given the ranks for up to
/// <see cref="SignedRank.LargestExactWithTies"/> non-zero differences among at most
/// <see cref="SignedRank.LargestExactWithoutTies"/> pairs; beyond it is normal with mean [n(n+1) − z(z+1)]/4 and variance
/// [n(n+1)(2n+1) − z(z+1)(2z+1)]/24 − Σ(t³−t)/48 for z zeros among n pairs, continuity correction ½.</para>
/// <para>Estimate and interval are those of <see cref="SignedRank"/>, which keep zeros already. Effect size: rank-biserial
/// correlation over the ranks of non-zero differences.</para>
/// <para>Sources: Pratt (1959), Journal of the American Statistical Association 54, 655-667; Wilcoxon (1945), Biometrics Bulletin
/// 1, 80-83. Worked through in docs/methods/signed-rank.md.</para>
/// </remarks>
public static class SignedRankPratt
{
    /// <inheritdoc cref="SignedRank.Run"/>
    public static TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        int n = pairs.Count;
        if (n == 0)
            return TestResult.Untested(Outcome.TooFewSets, 0, 0);

        using var frame = scratch.Open();
        var ranks = SignedRanks.Of(pairs, frame);
        if (ranks.Zeros == 0)
            return SignedRank.Run(pairs, options, scratch);
        if (ranks.Ranked == 0)
            return TestResult.Untested(Outcome.NothingDiffers, n, 2 * n, Remarks.Zeros);

        // Every rank moves up by the number of zeros.
        double sum = (0.5 * ranks.DoubledPositiveSum) + ((double)ranks.Zeros * ranks.Positive);
        double half = 0.25 * ranks.Ranked * (n + ranks.Zeros + 1.0);
        bool isExact = ranks.Ranked <= SignedRank.LargestExactWithTies && n <= SignedRank.LargestExactWithoutTies;
        var tails = isExact ? ExactTails(ranks, sum, scratch) : SignedRankNormal.Tails(sum, n, ranks.Zeros, ranks.TieTerm);
        return SignedRankResult.Of(ranks, isExact, sum, half, tails, options, scratch);
    }

    private static (Probability Lower, Probability Upper) ExactTails(in SignedRanks ranks, double sum, Scratch scratch)
    {
        using var frame = scratch.Open();
        Span<int> moved = frame.Integers(ranks.Ranked);
        // Whole ranks need no halves, and half the sums.
        int unit = ranks.HasTies ? 2 : 1;
        for (int i = 0; i < moved.Length; i++)
            moved[i] = (unit * ranks.Zeros) + (ranks.HasTies ? ranks.DoubledRanks[i] : i + 1);
        return ConditionalRankSum.Tails(moved, (long)(unit * sum), scratch);
    }
}
