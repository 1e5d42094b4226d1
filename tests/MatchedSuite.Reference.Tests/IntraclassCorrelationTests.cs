using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Twins;

namespace MatchedSuite.Reference.Tests;

/// <summary>Six targets and four judges (Shrout and Fleiss 1979, table 2). Expected numbers: exact fractions, mpmath and base R 4.2.2.</summary>
public class IntraclassCorrelationTests
{
    [Fact]
    public void The_one_way_correlation_of_Shrout_and_Fleiss_agrees()
    {
        var result = OfJudges();
        Check(result.BetweenMeanSquare, "BMS");
        Check(result.WithinMeanSquare, "WMS");
        Check(result.Estimate, "icc_1_1");
        Check(result.F, "F_1");
        Check(result.P.Value, "p_1");
        Check(result.Interval.Low, "icc_1_1_ci95_lo");
        Check(result.Interval.High, "icc_1_1_ci95_hi");
    }

    [Fact]
    public void The_page_on_twins_shows_what_is_computed()
    {
        var result = OfJudges();
        var page = MethodPage.Of("twins");
        page.Shows("mean squares between, within", $"{result.BetweenMeanSquare}, {result.WithinMeanSquare}");
        page.Shows("ICC(1,1), interval, 95 %", $"{result.Estimate}, {result.Interval.Low} to {result.Interval.High}");
        page.Shows("F, df, df2, p", $"{result.F}, {result.DegreesOfFreedom}, {result.DenominatorDegreesOfFreedom}, {result.P.Value}");
        page.Shows("Falconer, of r_MZ = 0.8 and r_DZ = 0.5", $"{Falconer.Heritability(0.8, 0.5)}");
    }

    private static IntraclassResult OfJudges()
    {
        var table = Expected.Table("shrout_fleiss");
        double[][] judges = [.. Enumerable.Range(1, 4).Select(judge => table.Numbers($"judge{judge}"))];
        double[] values = [.. Enumerable.Range(0, table.Rows).SelectMany(target => judges.Select(judge => judge[target]))];
        return IntraclassCorrelation.Of(values, 4, TestOptions.Default, new Scratch());
    }

    private static void Check(double actual, string quantity) => Expected.Check(actual, "shrout_fleiss", "icc", quantity);
}
