using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Arms;

namespace MatchedSuite.Reference.Tests;

/// <summary>The worked examples of the pages on changes between arms and on crossovers show what the methods compute.</summary>
public class ArmWorkedExamplesTests
{
    [Fact]
    public void Change_welch_page() => ShowsT(MethodPage.Of("change-welch"), ChangeBetweenArmsTests.Run(ChangeWelch.Run, "FT", Sides.Two));

    [Fact]
    public void Change_ancova_page() => ShowsT(MethodPage.Of("change-ancova"), ChangeBetweenArmsTests.Run(ChangeAncova.Run, "FT", Sides.Two));

    [Fact]
    public void Change_rank_sum_page()
    {
        var result = ChangeBetweenArmsTests.Run(ChangeRankSum.Run, "FT", Sides.Two);
        var page = MethodPage.Of("change-rank-sum");
        page.Shows("U", $"{result.Statistic}");
        page.Shows("p", $"{result.P.Value}");
        page.Shows("estimate", $"{result.Estimate}");
        page.Shows("interval, 95 %", $"{result.Interval.Low} to {result.Interval.High}");
        page.Shows("effect size", $"{result.EffectSize}");
    }

    [Fact]
    public void Crossover_t_page()
    {
        var (treatment, period, carryOver) = CrossoverTests.Invented();
        var page = MethodPage.Of("crossover-t");
        ShowsT(page, treatment);
        page.Shows("period: estimate, p", $"{period.Estimate}, {period.P.Value}");
        page.Shows("carry-over: estimate, p", $"{carryOver.Estimate}, {carryOver.P.Value}");
    }

    [Fact]
    public void Mainland_Gart_page()
    {
        var result = CrossoverTests.Binary(Sides.Two);
        var page = MethodPage.Of("mainland-gart");
        page.Shows("p", $"{result.P.Value}");
        page.Shows("log odds ratio", $"{result.Estimate}");
        page.Shows("interval, 95 %", $"{result.Interval.Low} to {result.Interval.High}");
        page.Shows("odds ratio, interval", $"{Math.Exp(result.Estimate)}, {Math.Exp(result.Interval.Low)} to {Math.Exp(result.Interval.High)}");
    }

    private static void ShowsT(MethodPage page, TestResult result)
    {
        page.Shows("estimate", $"{result.Estimate}");
        page.Shows("standard error", $"{result.StandardError}");
        page.Shows("interval, 95 %", $"{result.Interval.Low} to {result.Interval.High}");
        page.Shows("t", $"{result.Statistic}");
        page.Shows("df", $"{result.DegreesOfFreedom}");
        page.Shows("p", $"{result.P.Value}");
        page.Shows("effect size", $"{result.EffectSize}");
    }
}
