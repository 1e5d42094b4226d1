using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Reference.Tests;

/// <summary>The worked examples of the pages on pair methods show what the methods compute.</summary>
public class PairWorkedExamplesTests
{
    private delegate TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch);

    [Fact]
    public void Paired_t_page()
    {
        var result = On("sleep", "drug1", "drug2", PairedT.Run);
        var page = MethodPage.Of("paired-t");
        page.Shows("estimate", $"{result.Estimate}");
        page.Shows("standard error", $"{result.StandardError}");
        page.Shows("interval, 95 %", $"{result.Interval.Low} to {result.Interval.High}");
        page.Shows("t", $"{result.Statistic}");
        page.Shows("df", $"{result.DegreesOfFreedom}");
        page.Shows("p", $"{result.P.Value}");
        page.Shows("effect size", $"{result.EffectSize}");
    }

    [Fact]
    public void Signed_rank_page()
    {
        var result = On("hw_depression", "before", "after", SignedRank.Run);
        var page = MethodPage.Of("signed-rank");
        page.Shows("V", $"{result.Statistic}");
        ShowsRankResult(page, result);
    }

    [Fact]
    public void Sign_page()
    {
        var result = On("hw_depression", "before", "after", SignTest.Run);
        var page = MethodPage.Of("sign");
        page.Shows("positive", $"{result.Statistic}");
        ShowsRankResult(page, result);
    }

    [Fact]
    public void McNemar_page()
    {
        var table = new PairedTable(26, 15, 7, 37);
        var page = MethodPage.Of("mcnemar");
        var plain = McNemar.Run(table, TestOptions.Default);
        var corrected = McNemarCorrected.Run(table, TestOptions.Default);
        page.Shows("log odds ratio", $"{plain.Estimate}");
        page.Shows("standard error", $"{plain.StandardError}");
        page.Shows("interval, 95 %", $"{plain.Interval.Low} to {plain.Interval.High}");
        page.Shows("mcnemar: statistic, p", $"{plain.Statistic}, {plain.P.Value}");
        page.Shows("mcnemar-corrected: statistic, p", $"{corrected.Statistic}, {corrected.P.Value}");
        page.Shows("mcnemar-exact: p", $"{McNemarExact.Run(table, TestOptions.Default).P.Value}");
        page.Shows("mcnemar-midp: p", $"{McNemarMidP.Run(table, TestOptions.Default).P.Value}");
        page.Shows("odds ratio, interval", $"{Math.Exp(plain.Estimate)}, {Math.Exp(plain.Interval.Low)} to {Math.Exp(plain.Interval.High)}");
    }

    private static void ShowsRankResult(MethodPage page, TestResult result)
    {
        page.Shows("p", $"{result.P.Value}");
        page.Shows("estimate", $"{result.Estimate}");
        page.Shows("interval, 95 %", $"{result.Interval.Low} to {result.Interval.High}");
        page.Shows("effect size", $"{result.EffectSize}");
        page.Shows("smallest possible p", $"{result.SmallestPossibleP.Value}");
    }

    private static TestResult On(string dataset, string index, string reference, Run run)
    {
        var table = Expected.Table(dataset);
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return run(PairSample.Of(table.Numbers(index), table.Numbers(reference), frame), TestOptions.Default, scratch);
    }
}
