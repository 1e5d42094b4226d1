using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Strata;

/// <summary>Exact comparison of the discordant pairs of two strata: do they lean the same way equally strongly?</summary>
/// <remarks>
/// <para>Given all margins, how many of the first stratum's discordant pairs are of the kind b is hypergeometric where the odds b/c are
/// the same in both strata. Two-sided p is twice the smaller tail, at most 1. Estimate: difference of the log odds ratios, first less
/// second, with standard error √(1/b₁ + 1/c₁ + 1/b₂ + 1/c₂); infinite and without an error where a count is 0. No interval. Greater means
/// that the first stratum leans more to the index role.</para>
/// <para>Assumes independent pairs, nothing about their number. Source: Fisher (1935), The Design of Experiments, ch. II; for pairs Breslow
/// and Day (1980), Statistical Methods in Cancer Research 1, section 5.4. Worked through in docs/methods/strata.md.</para>
/// </remarks>
public static class DiscordanceDifference
{
    /// <summary>Tests two strata.</summary>
    /// <param name="first">Pairs of the first stratum.</param>
    /// <param name="second">Pairs of the second.</param>
    /// <param name="sides">Direction of the alternative.</param>
    /// <returns>
    /// <see cref="Outcome.TooFewSets"/> where a stratum has no pair, <see cref="Outcome.NothingDiffers"/> where one has no discordant pair
    /// or all discordant pairs lean one way.
    /// </returns>
    public static TestResult Run(in PairedTable first, in PairedTable second, Sides sides)
    {
        int sets = first.Pairs + second.Pairs;
        if (first.Pairs == 0 || second.Pairs == 0)
            return TestResult.Untested(Outcome.TooFewSets, sets, 2 * sets);
        int index = first.IndexOnly + second.IndexOnly, reference = first.ReferenceOnly + second.ReferenceOnly;
        if (first.Discordant == 0 || second.Discordant == 0 || index == 0 || reference == 0)
            return TestResult.Untested(Outcome.NothingDiffers, sets, 2 * sets);

        double b = first.IndexOnly, c = first.ReferenceOnly, otherB = second.IndexOnly, otherC = second.ReferenceOnly;
        bool hasZero = b * c * otherB * otherC == 0;
        var upper = Upper(first.IndexOnly, first.ReferenceOnly, second.IndexOnly, second.ReferenceOnly);
        var lower = Upper(first.ReferenceOnly, first.IndexOnly, second.ReferenceOnly, second.IndexOnly);
        return new TestResult
        {
            Sets = sets,
            Samples = 2 * sets,
            Estimate = Math.Log(b / c) - Math.Log(otherB / otherC),
            StandardError = hasZero ? double.NaN : Math.Sqrt((1 / b) + (1 / c) + (1 / otherB) + (1 / otherC)),
            Statistic = b,
            P = Tails.ForSides(sides, lower, upper),
            Remarks = Remarks.Exact | (hasZero ? Remarks.OneSidedDiscordance : 0),
        };
    }

    // P of this table and of those with more in b: the point probability, times falling ratios.
    private static Probability Upper(double b, double c, double otherB, double otherC)
    {
        double sum = 1, term = 1;
        for (double more = 0; c > more && otherB > more; more++)
        {
            term *= (c - more) * (otherB - more) / ((b + more + 1) * (otherC + more + 1));
            sum += term;
        }

        // Two binomials of one share, given their sum: the share cancels, and each keeps its digits (Loader 2000).
        double discordant = b + c + otherB + otherC, share = (b + otherB) / discordant;
        double log = LogPoint(b, b + c, share) + LogPoint(otherB, otherB + otherC, share) - LogPoint(b + otherB, discordant, share) + Math.Log(sum);
        return log >= 0 ? Probability.One : Probability.FromNaturalLog(log);
    }

    private static double LogPoint(double x, double n, double share) => Tails.NaturalLog(Binomial.Point((long)x, (long)n, share));
}
