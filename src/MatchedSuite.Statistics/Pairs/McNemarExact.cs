using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>McNemar's test, exact: b is binomial(b + c, ½) where neither direction is more frequent.</summary>
/// <remarks>
/// <para>Statistic: b. Two-sided p is twice the smaller tail, at most 1. Estimate and interval as <see cref="McNemar"/>; the interval
/// excludes 0 exactly when p &lt; 1 − confidence. The smallest possible p is that of the discordant pairs at hand.</para>
/// <para>Assumes independent pairs, nothing about their number.</para>
/// <para>Source: Mosteller (1952), Biometrics 8, 220-226. Worked through in docs/methods/mcnemar.md.</para>
/// </remarks>
public static class McNemarExact
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
        return result with
        {
            Statistic = b,
            P = Tails.ForSides(options.Sides, Binomial.LowerTail(b, n, 0.5), Binomial.UpperTail(b, n, 0.5)),
            SmallestPossibleP = SignFlips.SmallestP(n, options.Sides),
            Remarks = result.Remarks | Remarks.Exact,
        };
    }
}
