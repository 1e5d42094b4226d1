using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Reference.Tests;

/// <summary>
/// Endometrial cancer, one 2×2 table a set (Mack et al. 1976; Breslow and Day 1980). Values: exact fractions, the
/// published formulas in R, and base R's Mantel-Haenszel test without continuity correction.
/// </summary>
public class MantelHaenszelTests
{
    [Theory]
    [InlineData("est")]
    [InlineData("gall")]
    [InlineData("hyp")]
    public void Every_quantity_agrees(string endpoint)
    {
        string @case = "matched_mantel_haenszel_" + endpoint;
        var scratch = new Scratch();
        using Scratch.Frame frame = scratch.Open();
        TestResult result = MantelHaenszel.Run(ReferenceSets.Of("bdendo", endpoint, frame), TestOptions.Default, scratch);
        Expected.Check(Math.Exp(result.Estimate), "bdendo", @case, "or");
        Expected.Check(result.Statistic, "bdendo", @case, "chi2");
        Expected.Check(result.P.Value, "bdendo", @case, "p");
        Expected.Check(result.StandardError, "bdendo", @case, "rbg_se_log_or");
        Expected.Check(Math.Exp(result.Interval.Low), "bdendo", @case, "rbg95_lo");
        Expected.Check(Math.Exp(result.Interval.High), "bdendo", @case, "rbg95_hi");
    }

    [Theory]
    [InlineData("approval_2x2")]
    [InlineData("hodgkin_2x2")]
    [InlineData("endometrial_1to1_est")]
    [InlineData("equal_discordant")]
    public void Pairs_give_the_matched_odds_ratio_and_McNemars_test(string dataset)
    {
        var scratch = new Scratch();
        using Scratch.Frame frame = scratch.Open();
        TestResult result = MantelHaenszel.Run(ReferenceSets.OfDiscordantPairs(dataset, frame), TestOptions.Default, scratch);
        Expected.Check(Math.Exp(result.Estimate), dataset, "matched_or", "or");
        Expected.Check(Math.Exp(result.Interval.Low), dataset, "matched_or", "wald95_lo");
        Expected.Check(Math.Exp(result.Interval.High), dataset, "matched_or", "wald95_hi");
        Expected.Check(result.Statistic, dataset, "mcnemar", "chi2");
        Expected.Check(result.P.Value, dataset, "mcnemar", "p_chi2");
    }
}
