using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Reference.Tests;

/// <summary>The worked examples of the pages on repeated visits show what the methods compute.</summary>
public class VisitWorkedExamplesTests
{
    private static readonly Scratch Scratch = new();

    [Fact]
    public void Repeated_measures_anova_page()
    {
        var fit = RepeatedMeasuresAnova.Fit(VisitTables.ErgoStool().Sample(), Scratch);
        var page = MethodPage.Of("rm-anova");
        page.Shows("sum of squares: visits, subjects, error", $"{fit.VisitSquares}, {fit.SubjectSquares}, {fit.ErrorSquares}");
        page.Shows("F", $"{fit.F}");
        page.Shows("ε: Greenhouse–Geisser, Huynh–Feldt", $"{fit.GreenhouseGeisser}, {fit.HuynhFeldt}");
        var corrected = RepeatedMeasuresAnova.GreenhouseGeisser(VisitTables.ErgoStool().Sample(), TestOptions.Default, Scratch);
        page.Shows("rm-anova: df, df2, p", $"{corrected.DegreesOfFreedom}, {corrected.DenominatorDegreesOfFreedom}, {corrected.P.Value}");
        page.Shows("rm-anova-hf: p", $"{fit.P(SphericityCorrection.HuynhFeldt).Value}");
        page.Shows("rm-anova-raw: p", $"{fit.P(SphericityCorrection.None).Value}");
        page.Shows("Mauchly: W, p", $"{fit.Sphericity.W}, {fit.Sphericity.P.Value}");
        page.Shows("effect size", $"{fit.PartialEtaSquared}");
    }

    [Fact]
    public void Friedman_page()
    {
        var fit = Friedman.Fit(VisitTables.RoundingTimes().Sample(), Scratch);
        var page = MethodPage.Of("friedman");
        page.Shows("χ²", $"{fit.ChiSquared}");
        page.Shows("df", $"{(double)fit.DegreesOfFreedom}");
        page.Shows("p", $"{fit.ChiSquaredP.Value}");
        page.Shows("effect size (Kendall's W)", $"{fit.KendallW}");
        page.Shows("Iman–Davenport: F, p", $"{fit.ImanDavenportF}, {fit.ImanDavenportP.Value}");
        page.Shows("exact p of the cotton table", $"{Friedman.Run(VisitTables.Cotton().Sample(), TestOptions.Default, Scratch).P.Value}");
    }

    [Fact]
    public void Page_trend_page()
    {
        var greater = new TestOptions { Sides = Sides.Greater };
        var result = PageTrend.Run(VisitTables.Cotton().Sample(), greater, Scratch);
        var fit = PageTrend.Fit(VisitTables.Cotton().Sample(), Scratch);
        var page = MethodPage.Of("page-trend");
        page.Shows("L", $"{result.Statistic}");
        page.Shows("mean and standard deviation of L", $"{fit.Mean}, {fit.StandardDeviation}");
        page.Shows("p, greater, exact", $"{result.P.Value}");
        page.Shows("p, greater, normal", $"{fit.NormalUpper.Value}");
        page.Shows("effect size", $"{result.EffectSize}");
    }

    [Fact]
    public void Linear_trend_page()
    {
        var result = LinearTrend.Run(VisitTables.Orthodont().Sample(), TestOptions.Default, Scratch);
        var page = MethodPage.Of("linear-trend");
        ShowsT(page, result);
    }

    [Fact]
    public void Cochran_q_page()
    {
        var result = CochranQ.Run(CochranQTests.ThreeDrugs(), TestOptions.Default, Scratch);
        var page = MethodPage.Of("cochran-q");
        page.Shows("Q", $"{result.Statistic}");
        page.Shows("df", $"{result.DegreesOfFreedom}");
        page.Shows("p", $"{result.P.Value}");
        page.Shows("effect size", $"{result.EffectSize}");
    }

    [Fact]
    public void Mixed_model_page()
    {
        using var frame = Scratch.Open();
        var fit = MixedModel.Fit(VisitTables.Orthodont(MixedModelTests.DroppedRows).Sample(), VisitTerm.Means, frame);
        var page = MethodPage.Of("mixed-model");
        page.Shows("variance between, within", $"{fit.VarianceBetween}, {fit.VarianceWithin}");
        page.Shows("restricted log-likelihood", $"{fit.RestrictedLogLikelihood}");
        var interval = VarianceRatioInterval.OfIntraclassCorrelation(fit, 0.95, Scratch);
        page.Shows("intraclass correlation, interval", $"{fit.IntraclassCorrelation}, {interval.Low} to {interval.High}");
        var difference = MixedModel.Difference(fit, 3, 0, TestOptions.Default, Scratch);
        ShowsT(page, difference);
        var omnibus = MixedModel.Omnibus(fit, TestOptions.Default, Scratch);
        page.Shows("omnibus: F", $"{omnibus.Statistic}");
        page.Shows("omnibus: df, df2, p", $"{omnibus.DegreesOfFreedom}, {omnibus.DenominatorDegreesOfFreedom}, {omnibus.P.Value}");
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
