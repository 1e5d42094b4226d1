using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>McNemar's test with continuity correction.</summary>
/// <remarks>
/// <para>As <see cref="McNemar"/>, with the statistic max(0, |b − c| − 1)²/(b + c): 0 where b = c. One-sided p moves b − c by 1 against
/// the alternative: z = (b − c − 1)/√(b + c) for greater, (b − c + 1)/√(b + c) for less.</para>
/// <para>Source: Edwards (1948), Psychometrika 13, 185-187. Worked through in docs/methods/mcnemar.md.</para>
/// </remarks>
public static class McNemarCorrected
{
    /// <inheritdoc cref="McNemar.Run(in PairSample, TestOptions, Scratch)"/>
    public static TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch) => Run(PairedTable.Of(pairs), options);

    /// <inheritdoc cref="McNemar.Run(in PairedTable, TestOptions)"/>
    public static TestResult Run(in PairedTable table, TestOptions options)
    {
        var result = DiscordantPairs.Describe(table, options);
        if (result.Outcome != Outcome.Tested)
            return result;
        double difference = table.IndexOnly - table.ReferenceOnly;
        double root = Math.Sqrt(table.Discordant);
        double excess = Math.Max(0, Math.Abs(difference) - 1);
        return result with
        {
            Statistic = excess * excess / table.Discordant,
            DegreesOfFreedom = 1,
            P = Tails.ForSides(options.Sides,
                StandardNormal.LowerTail((difference + 1) / root), StandardNormal.UpperTail((difference - 1) / root)),
        };
    }
}
