using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Reference.Tests;

/// <summary>The worked examples of the pages on methods for matched sets show what the methods compute.</summary>
public class SetWorkedExamplesTests
{
    private readonly Scratch _scratch = new();

    [Fact]
    public void Conditional_logistic_page()
    {
        using Scratch.Frame frame = _scratch.Open();
        SetSample sets = ReferenceSets.Of("infert", "spontaneous", frame, "induced");
        TestResult result = ConditionalLogistic.Run(sets, TestOptions.Default, _scratch);
        ConditionalLogisticFit fit = ConditionalLogistic.Fit(sets, TestOptions.Default, _scratch);
        Interval profile = ConditionalLogistic.ProfileInterval(sets, TestOptions.Default, _scratch);
        MethodPage page = MethodPage.Of("conditional-logistic");
        ShowsEstimate(page, result);
        page.Shows("odds ratio, interval", $"{Math.Exp(result.Estimate)}, {Math.Exp(result.Interval.Low)} to {Math.Exp(result.Interval.High)}");
        page.Shows("profile interval, 95 %", $"{profile.Low} to {profile.High}");
        page.Shows("z", $"{result.Statistic}");
        page.Shows("p", $"{result.P.Value}");
        page.Shows("log-likelihood; without the endpoint; without anything", $"{fit.LogLikelihood}; {fit.LogLikelihoodOfCovariates}; {fit.NullLogLikelihood}");
        page.Shows("likelihood ratio: χ², p", $"{fit.LikelihoodRatio.Statistic}, {fit.LikelihoodRatio.P.Value}");
        page.Shows("score: χ², p", $"{fit.Score.Statistic}, {fit.Score.P.Value}");
    }

    [Fact]
    public void Conditional_logistic_page_on_levels()
    {
        using Scratch.Frame frame = _scratch.Open();
        SetSample sets = ReferenceSets.Of("bdendo", "dur", frame);
        double[] odds = new double[4], errors = new double[4];
        ConditionalLogisticFit fit = ConditionalLogisticCategories.Fit(sets, [0, 1, 2, 3, 4], TestOptions.Default, _scratch, odds, errors);
        TestResult trend = ConditionalLogistic.Run(sets, TestOptions.Default, _scratch);
        MethodPage page = MethodPage.Of("conditional-logistic");
        page.Shows("trend: log odds ratio a step, p", $"{trend.Estimate}, {trend.P.Value}");
        page.Shows("levels 1 to 4 against 0: odds ratios", $"{Math.Exp(odds[0])}, {Math.Exp(odds[1])}, {Math.Exp(odds[2])}, {Math.Exp(odds[3])}");
        page.Shows("omnibus: χ², df, p", $"{fit.LikelihoodRatio.Statistic}, {fit.LikelihoodRatio.DegreesOfFreedom}, {fit.LikelihoodRatio.P.Value}");
    }

    [Fact]
    public void Within_set_linear_page()
    {
        using Scratch.Frame frame = _scratch.Open();
        TestResult result = WithinSetLinear.Run(ReferenceSets.Of("bdendo", "age", frame), TestOptions.Default, _scratch);
        MethodPage page = MethodPage.Of("within-set-linear");
        ShowsEstimate(page, result);
        page.Shows("t", $"{result.Statistic}");
        page.Shows("df", $"{result.DegreesOfFreedom}");
        page.Shows("p", $"{result.P.Value}");
        page.Shows("effect size", $"{result.EffectSize}");
    }

    [Fact]
    public void Within_set_robust_page()
    {
        using Scratch.Frame frame = _scratch.Open();
        TestResult result = WithinSetRobust.Run(ReferenceSets.Of("bdendo", "age", frame), TestOptions.Default, _scratch);
        MethodPage page = MethodPage.Of("within-set-robust");
        ShowsEstimate(page, result);
        page.Shows("t", $"{result.Statistic}");
        page.Shows("df", $"{result.DegreesOfFreedom}");
        page.Shows("p", $"{result.P.Value}");
    }

    [Fact]
    public void Aligned_rank_page()
    {
        using Scratch.Frame frame = _scratch.Open();
        TestResult result = AlignedRank.Run(ReferenceSets.Of("bdendo", "dur", frame), TestOptions.Default, _scratch);
        MethodPage page = MethodPage.Of("aligned-rank");
        page.Shows("z", $"{result.Statistic}");
        page.Shows("p", $"{result.P.Value}");
        page.Shows("estimate", $"{result.Estimate}");
        page.Shows("interval, 95 %", $"{result.Interval.Low} to {result.Interval.High}");
    }

    [Fact]
    public void Set_relabel_page()
    {
        using Scratch.Frame frame = _scratch.Open();
        TestResult result = SetRelabel.Run(ReferenceSets.FirstOf("bdendo", "dur", 8, frame), TestOptions.Default, _scratch);
        MethodPage page = MethodPage.Of("set-relabel");
        page.Shows("statistic", $"{result.Statistic}");
        page.Shows("p", $"{result.P.Value}");
        page.Shows("estimate", $"{result.Estimate}");
        page.Shows("interval, 95 %", $"{result.Interval.Low} to {result.Interval.High}");
        page.Shows("smallest possible p", $"{result.SmallestPossibleP.Value}");
    }

    [Fact]
    public void Mantel_Haenszel_page()
    {
        using Scratch.Frame frame = _scratch.Open();
        TestResult result = MantelHaenszel.Run(ReferenceSets.Of("bdendo", "est", frame), TestOptions.Default, _scratch);
        MethodPage page = MethodPage.Of("mantel-haenszel");
        ShowsEstimate(page, result);
        page.Shows("odds ratio, interval", $"{Math.Exp(result.Estimate)}, {Math.Exp(result.Interval.Low)} to {Math.Exp(result.Interval.High)}");
        page.Shows("χ²", $"{result.Statistic}");
        page.Shows("p", $"{result.P.Value}");
    }

    private static void ShowsEstimate(MethodPage page, TestResult result)
    {
        page.Shows("estimate", $"{result.Estimate}");
        page.Shows("standard error", $"{result.StandardError}");
        page.Shows("interval, 95 %", $"{result.Interval.Low} to {result.Interval.High}");
    }
}
