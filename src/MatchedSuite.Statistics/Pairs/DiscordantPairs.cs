using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>What all McNemar procedures share: the log odds ratio b/c of discordant pairs and its exact conditional interval.</summary>
/// <remarks>
/// Given b + c, b is binomial with the odds b/c. Clopper–Pearson limits of b/(b + c) become limits of the log odds; each odds
/// is a ratio of a limit for b to the opposite limit for c, so none is a difference from 1. Source: Breslow and Day (1980),
/// Statistical Methods in Cancer Research 1, section 5.2.
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
        var shareOfB = Binomial.ExactLimits(table.IndexOnly, table.Discordant, options.TailShare);
        var shareOfC = Binomial.ExactLimits(table.ReferenceOnly, table.Discordant, options.TailShare);
        return new TestResult
        {
            Sets = n,
            Samples = 2 * n,
            Estimate = Math.Log(b / c),
            StandardError = isOneSided ? double.NaN : Math.Sqrt((1 / b) + (1 / c)),
            Interval = Interval.Pointing(
                Math.Log(shareOfB.Low / shareOfC.High), Math.Log(shareOfB.High / shareOfC.Low), options.Sides),
            Remarks = isOneSided ? Remarks.OneSidedDiscordance : Remarks.None,
        };
    }
}
