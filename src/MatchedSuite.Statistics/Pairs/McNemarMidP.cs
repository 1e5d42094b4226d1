using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>McNemar's test with the mid-p-value: the observed count enters its tail by half.</summary>
/// <remarks>
/// <para>Statistic: b. One-sided p is the exact tail less half the probability of b. Two-sided p is the exact one less the
/// probability of b, and 1 − P(b)/2 where b = c. Estimate and interval as <see cref="McNemar"/>. Less conservative than the
/// exact test; it may exceed its level slightly.</para>
/// <para>Sources: Lancaster (1961), Journal of the American Statistical Association 56, 223-234; Fagerland, Lydersen and Laake
/// (2013), BMC Medical Research Methodology 13, 91. Worked through in docs/methods/mcnemar.md.</para>
/// </remarks>
public static class McNemarMidP
{
    /// <inheritdoc cref="McNemar.Run(in PairSample, TestOptions, Scratch)"/>
    public static TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch) => Run(PairedTable.Of(pairs), options);

    /// <inheritdoc cref="McNemar.Run(in PairedTable, TestOptions)"/>
    public static TestResult Run(in PairedTable table, TestOptions options)
    {
        var result = DiscordantPairs.Describe(table, options);
        if (result.Outcome != Outcome.Tested)
            return result;
        int b = table.IndexOnly, n = table.Discordant;
        var point = Binomial.Point(b, n, 0.5);
        return result with
        {
            Statistic = b,
            P = options.Sides == Sides.Two && 2 * b == n
                ? Probability.Of(1 - (0.5 * point.Value))
                : Tails.ForSides(options.Sides,
                    LessHalf(Binomial.LowerTail(b, n, 0.5), point), LessHalf(Binomial.UpperTail(b, n, 0.5), point)),
            // Where all point one way the tail is the point alone, and half of it counts.
            SmallestPossibleP = SignFlips.SmallestP(n, options.Sides).Times(0.5),
            Remarks = result.Remarks | Remarks.Exact,
        };
    }

    // The tail contains the point, so at least half of it remains and no digit is lost; the ratio is safe below underflow too.
    private static Probability LessHalf(Probability tail, Probability point) =>
        tail.Times(1 - (0.5 * Math.Pow(10, point.Log10 - tail.Log10)));
}
