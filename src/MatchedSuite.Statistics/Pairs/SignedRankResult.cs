using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>What both treatments of zeros share: the Hodges–Lehmann estimate with its limits, and the result around a rank sum.</summary>
internal static class SignedRankResult
{
    /// <summary>The result of one endpoint with at least one non-zero difference.</summary>
    /// <param name="ranks">Its ranked differences.</param>
    /// <param name="isExact">True where the tails are exact; then the limits are too, as far as the null is tabulated.</param>
    /// <param name="positiveSum">Rank sum of the positive differences.</param>
    /// <param name="half">Half of the rank sum of all non-zero differences.</param>
    /// <param name="tails">P(W ≤ sum) and P(W ≥ sum).</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory.</param>
    public static TestResult Of(
        in SignedRanks ranks, bool isExact, double positiveSum, double half, (Probability Lower, Probability Upper) tails,
        TestOptions options, Scratch scratch)
    {
        int n = ranks.Sorted.Length;
        long quantile = isExact && n <= SignedRankNull.LargestN
            ? SignedRankNull.Of(n).LowerQuantile(options.TailShare)
            : SignedRankNormal.LowerQuantile(n, options.TailShare);
        var (estimate, low, high) = HodgesLehmann.Of(ranks.Sorted, quantile, scratch);
        return new TestResult
        {
            Sets = n,
            Samples = 2 * n,
            Estimate = estimate,
            Interval = Interval.Pointing(low, high, options.Sides),
            Statistic = positiveSum,
            P = Tails.ForSides(options.Sides, tails.Lower, tails.Upper),
            EffectSize = (positiveSum - half) / half,
            SmallestPossibleP = isExact ? SignFlips.SmallestP(ranks.Ranked, options.Sides) : Probability.Missing,
            Remarks = (ranks.HasTies ? Remarks.Ties : 0) | (ranks.Zeros > 0 ? Remarks.Zeros : 0)
                | (isExact ? Remarks.Exact : 0) | (quantile == 0 ? Remarks.WideAsData : 0),
        };
    }
}
