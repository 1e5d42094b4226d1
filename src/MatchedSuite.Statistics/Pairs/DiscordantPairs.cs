namespace MatchedSuite.Statistics.Pairs;

/// <summary>What all McNemar procedures share: the log odds ratio b/c of discordant pairs and its exact conditional interval.</summary>
/// <remarks>
/// Given b + c, b is binomial with the odds b/c. Source: Breslow and Day (1980), Statistical Methods in Cancer Research 1,
/// section 5.2.
/// </remarks>
internal static class DiscordantPairs
{
    /// <summary>The result without statistic and p-value; untested where there is no pair or none is discordant.</summary>
    public static TestResult Describe(in PairedTable table, TestOptions options)
    {
        Require.OpenUnitInterval(options.Confidence);
        int n = table.Pairs;
        if (n == 0)
            return TestResult.Untested(Outcome.TooFewSets, 0, 0);
        if (table.Discordant == 0)
            return TestResult.Untested(Outcome.NothingDiffers, n, 2 * n);

        double b = table.IndexOnly, c = table.ReferenceOnly;
        bool isOneSided = b == 0 || c == 0;
        var (low, high) = ConditionalOdds.Limits(table.IndexOnly, table.ReferenceOnly, options.TailShare);
        return new TestResult
        {
            Sets = n,
            Samples = 2 * n,
            Estimate = Math.Log(b / c),
            StandardError = isOneSided ? double.NaN : Math.Sqrt((1 / b) + (1 / c)),
            Interval = Interval.Pointing(low, high, options.Sides),
            Remarks = isOneSided ? Remarks.OneSidedDiscordance : Remarks.None,
        };
    }
}
