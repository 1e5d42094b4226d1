using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Reference.Tests;

/// <summary>The worked examples of the pages on pair methods show what the methods compute.</summary>
public class PairWorkedExamplesTests
{
    private static readonly double[] FirstCovariate = [1.2, -0.4, 0.7, 2.1, -1.5, 0.3, 0.9, -0.8, 1.6, 0.1];
    private static readonly double[] SecondCovariate = [3, 1, -2, 4, 0, 1, -1, 2, 5, -3];

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
        var interval = EffectSizeInterval.Of(result.Statistic, result.Sets, TestOptions.Default);
        page.Shows("effect size, interval", $"{interval.Low} to {interval.High}");

        var adjusted = On("sleep", "drug1", "drug2", (in PairSample pairs, TestOptions options, Scratch scratch) =>
            AdjustedPairedT.Run(RegressionPairs.WithCovariates(pairs, (double[])[.. FirstCovariate, .. SecondCovariate]), options, scratch));
        page.Shows("adjusted estimate, standard error", $"{adjusted.Estimate}, {adjusted.StandardError}");
        page.Shows("adjusted interval, 95 %", $"{adjusted.Interval.Low} to {adjusted.Interval.High}");
        page.Shows("adjusted t, df, p", $"{adjusted.Statistic}, {adjusted.DegreesOfFreedom}, {adjusted.P.Value}");
    }

    [Fact]
    public void Moderated_paired_t_page()
    {
        var prior = VariancePrior.Fit(
            [0.8, 1.3, 0.2, 2.9, 0.55, 1.1, 4.2, 0.33, 0.95, 1.7, 0.61, 2.2], [9, 9, 8, 9, 9, 7, 9, 9, 9, 9, 8, 9])!.Value;
        var result = ModeratedPairedT.Finish(0.9, 0.8, 9, 10, prior, TestOptions.Default);
        var page = MethodPage.Of("moderated-paired-t");
        page.Shows("d0, s0²", $"{prior.DegreesOfFreedom}, {prior.Variance}");
        page.Shows("s̃²", $"{prior.Shrink(0.8, 9)}");
        page.Shows("interval, 95 %", $"{result.Interval.Low} to {result.Interval.High}");
        page.Shows("t, df, p", $"{result.Statistic}, {result.DegreesOfFreedom}, {result.P.Value}");
        page.Shows("effect size", $"{result.EffectSize}");
    }

    [Fact]
    public void Trimmed_mean_page()
    {
        var result = On("darwin_maize", "cross", "self", TrimmedMean.Run);
        var page = MethodPage.Of("trimmed-mean");
        page.Shows("estimate, standard error", $"{result.Estimate}, {result.StandardError}");
        page.Shows("interval, 95 %", $"{result.Interval.Low} to {result.Interval.High}");
        page.Shows("t, df, p", $"{result.Statistic}, {result.DegreesOfFreedom}, {result.P.Value}");
    }

    [Fact]
    public void Sign_flip_page()
    {
        var result = On("darwin_maize", "cross", "self", SignFlipMean.Run);
        var greater = On("darwin_maize", "cross", "self", (in PairSample pairs, TestOptions options, Scratch scratch) =>
            SignFlipMean.Run(pairs, options with { Sides = Sides.Greater }, scratch));
        var page = MethodPage.Of("sign-flip");
        page.Shows("estimate", $"{result.Estimate}");
        page.Shows("interval, 95 %", $"{result.Interval.Low} to {result.Interval.High}");
        page.Shows("p, two-sided", $"{result.P.Value}");
        page.Shows("p, greater; times 2^15", $"{greater.P.Value}; {greater.P.Value * 32768}");
        page.Shows("smallest possible p", $"{result.SmallestPossibleP.Value}");
    }

    [Fact]
    public void Within_pair_slope_page()
    {
        var alone = On("sleep", "drug1", "drug2", (in PairSample pairs, TestOptions options, Scratch scratch) =>
            WithinPairSlope.Run(RegressionPairs.WithExposure(pairs, FirstCovariate, []), options, scratch));
        var adjusted = On("sleep", "drug1", "drug2", (in PairSample pairs, TestOptions options, Scratch scratch) =>
            WithinPairSlope.Run(RegressionPairs.WithExposure(pairs, FirstCovariate, SecondCovariate), options, scratch));
        var page = MethodPage.Of("within-pair-slope");
        page.Shows("slope, standard error", $"{alone.Estimate}, {alone.StandardError}");
        page.Shows("interval, 95 %", $"{alone.Interval.Low} to {alone.Interval.High}");
        page.Shows("t, df, p", $"{alone.Statistic}, {alone.DegreesOfFreedom}, {alone.P.Value}");
        page.Shows("effect size", $"{alone.EffectSize}");
        page.Shows("with the covariate: slope, standard error", $"{adjusted.Estimate}, {adjusted.StandardError}");
        page.Shows("with the covariate: t, df, p", $"{adjusted.Statistic}, {adjusted.DegreesOfFreedom}, {adjusted.P.Value}");
    }

    [Fact]
    public void Stuart_Maxwell_page()
    {
        var (right, left) = OrdinalPairsTests.Eyes();
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var pairs = PairSample.Of(right, left, frame);
        var (margins, symmetry) = (StuartMaxwell.Run(pairs, TestOptions.Default, scratch), Bowker.Run(pairs, TestOptions.Default, scratch));
        var page = MethodPage.Of("stuart-maxwell");
        page.Shows("stuart-maxwell: statistic, df, p", $"{margins.Statistic}, {margins.DegreesOfFreedom}, {margins.P.Value}");
        page.Shows("bowker: statistic, df, p", $"{symmetry.Statistic}, {symmetry.DegreesOfFreedom}, {symmetry.P.Value}");
    }

    [Fact]
    public void Paired_Poisson_page()
    {
        var result = PairedPoisson.Run(new EventTotals(1, 41, 15, 28010, 19017), TestOptions.Default);
        var page = MethodPage.Of("paired-poisson");
        page.Shows("log rate ratio, standard error", $"{result.Estimate}, {result.StandardError}");
        page.Shows("rate ratio, interval",
            $"{Math.Exp(result.Estimate)}, {Math.Exp(result.Interval.Low)} to {Math.Exp(result.Interval.High)}");
        page.Shows("p", $"{result.P.Value}");
    }

    [Fact]
    public void Rank_normal_page()
    {
        var scores = new double[8];
        RankNormalScores.Of([3, 1, 4, 1, 5, 9, 2, 6], scores, new Scratch());
        MethodPage.Of("rank-normal").Shows("scores",
            $"{scores[0]}, {scores[1]}, {scores[2]}, {scores[3]}, {scores[4]}, {scores[5]}, {scores[6]}, {scores[7]}");
    }

    [Fact]
    public void Signed_rank_page()
    {
        var result = On("hw_depression", "before", "after", SignedRank.Run);
        var page = MethodPage.Of("signed-rank");
        page.Shows("V", $"{result.Statistic}");
        ShowsRankResult(page, result);
        var (dropped, ranked) = (On("sleep", "drug2", "drug1", SignedRank.Run), On("sleep", "drug2", "drug1", SignedRankPratt.Run));
        page.Shows("dropped: V, p", $"{dropped.Statistic}, {dropped.P.Value}");
        page.Shows("pratt: V, p", $"{ranked.Statistic}, {ranked.P.Value}");
        page.Shows("estimate and interval of both", $"{ranked.Estimate}, {ranked.Interval.Low} to {ranked.Interval.High}");
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
        page.Shows("risk difference", $"{RiskDifference.Of(table)}");
        ShowsInterval(page, "Newcombe, method 10", RiskDifference.SquareAndAdd(table, TestOptions.Default));
        ShowsInterval(page, "Newcombe, method 8", RiskDifference.SquareAndAddUncorrected(table, TestOptions.Default));
        ShowsInterval(page, "Tango", RiskDifference.Score(table, TestOptions.Default));
    }

    private static void ShowsInterval(MethodPage page, string quantity, Interval interval) =>
        page.Shows(quantity, $"{interval.Low} to {interval.High}");

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
