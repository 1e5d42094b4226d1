using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>McNemar's test: among pairs whose two yes/no values differ, is either direction more frequent?</summary>
/// <remarks>
/// <para>b pairs have 1 in the index role alone, c in the reference role alone. Statistic: (b − c)²/(b + c), chi-squared with 1
/// degree of freedom; one-sided p from its signed root z = (b − c)/√(b + c). Estimate: log odds ratio log(b/c), standard
/// error √(1/b + 1/c), exact conditional interval; infinite where b or c is 0, and then without a standard error.</para>
/// <para>Assumes independent pairs and enough discordant ones (25, say) for the normal approximation.</para>
/// <para>Sources: McNemar (1947), Psychometrika 12, 153-157; Fagerland, Lydersen and Laake (2013), BMC Medical Research
/// Methodology 13, 91. Worked through in docs/methods/mcnemar.md.</para>
/// </remarks>
public static class McNemar
{
    /// <summary>Tests one endpoint with the values 0 and 1.</summary>
    /// <param name="pairs">The complete pairs; at least one must be discordant.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory of the calling thread; this method needs none.</param>
    /// <returns><see cref="Outcome.TooFewSets"/> without pairs, <see cref="Outcome.NothingDiffers"/> where no pair is discordant.</returns>
    /// <exception cref="ArgumentException">A value is neither 0 nor 1, or the confidence is out of range.</exception>
    public static TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch) => Run(PairedTable.Of(pairs), options);

    /// <summary>Tests a table of counts.</summary>
    /// <param name="table">The counted pairs.</param>
    /// <param name="options">Sides and confidence.</param>
    public static TestResult Run(in PairedTable table, TestOptions options)
    {
        var result = DiscordantPairs.Describe(table, options);
        if (result.Outcome != Outcome.Tested)
            return result;
        double difference = table.IndexOnly - table.ReferenceOnly;
        double z = difference / Math.Sqrt(table.Discordant);
        return result with
        {
            Statistic = difference * difference / table.Discordant,
            DegreesOfFreedom = 1,
            P = Tails.ForSides(options.Sides, StandardNormal.LowerTail(z), StandardNormal.UpperTail(z)),
        };
    }
}
