using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>Sign test: are positive differences as frequent as negative ones?</summary>
/// <remarks>
/// <para>Statistic: number of positive differences; exact binomial over the differences that are not zero by the decimal rule.</para>
/// <para>Estimate, in the endpoint's unit: median of all differences, zeros kept. The limits are order statistics d(k) and
/// d(n + 1 − k), k the smallest x with P(X ≤ x) at least the tail share, X binomial(n, ½): their coverage is at least the
/// confidence. Where k is 0 the limits are infinite. Without zeros the interval excludes 0 exactly when p &lt; 1 − confidence.
/// Effect size: positive minus negative over all non-zero differences.</para>
/// <para>Assumes independent pairs, nothing about shape.</para>
/// <para>Sources: Arbuthnott (1710), Philosophical Transactions 27, 186-190; Conover (1999), Practical Nonparametric Statistics,
/// sections 3.2 and 3.4. Worked through in docs/methods/sign.md.</para>
/// </remarks>
public static class SignTest
{
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
        Span<double> sorted = frame.Doubles(n);
        int positive = 0, negative = 0;
        for (int i = 0; i < n; i++)
        {
            double difference = DecimalTies.IsZero(pairs.Differences[i], pairs.Roundings[i]) ? 0 : pairs.Differences[i];
            sorted[i] = difference;
            positive += difference > 0 ? 1 : 0;
            negative += difference < 0 ? 1 : 0;
        }

        int signed = positive + negative;
        if (signed == 0)
            return TestResult.Untested(Outcome.NothingDiffers, n, 2 * n, Remarks.Zeros);

        AddressSort.Sort(sorted, frame);
        int quantile = LowerQuantile(n, options.TailShare);
        double low = quantile == 0 ? double.NegativeInfinity : sorted[quantile - 1];
        double high = quantile == 0 ? double.PositiveInfinity : sorted[n - quantile];
        return new TestResult
        {
            Sets = n,
            Samples = 2 * n,
            Estimate = (0.5 * sorted[(n - 1) / 2]) + (0.5 * sorted[n / 2]),
            Interval = Interval.Pointing(low, high, options.Sides),
            Statistic = positive,
            P = Tails.ForSides(options.Sides, Binomial.LowerTail(positive, signed, 0.5), Binomial.UpperTail(positive, signed, 0.5)),
            EffectSize = (double)(positive - negative) / signed,
            SmallestPossibleP = SignFlips.SmallestP(signed, options.Sides),
            Remarks = Remarks.Exact | (signed < n ? Remarks.Zeros : 0) | (quantile == 0 ? Remarks.WideAsData : 0),
        };
    }

    // Smallest x with P(X ≤ x) ≥ share, X binomial(n, ½): the normal quantile, moved until the exact tail agrees.
    private static int LowerQuantile(int n, double share)
    {
        double reach = StandardNormal.UpperQuantile(share) * Math.Sqrt(n) / 2;
        int x = (int)Math.Clamp(Math.Ceiling((n / 2.0) - 0.5 - reach), 0, n);
        while (x > 0 && Binomial.LowerTail(x - 1, n, 0.5).Value >= share)
            x--;
        while (x < n && Binomial.LowerTail(x, n, 0.5).Value < share)
            x++;
        return x;
    }
}
