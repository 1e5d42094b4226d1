using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Reference.Tests;

/// <summary>
/// Repeated-measures analysis of variance. Values: exact fractions and 50-digit tails (Python, mpmath), base R 4.2.2
/// (anova of a multivariate model, aov, mauchly.test).
/// </summary>
public class RepeatedMeasuresAnovaTests
{
    [Theory]
    [InlineData("ergostool")]
    [InlineData("orthodont")]
    [InlineData("sleepstudy")]
    [InlineData("rounding_times")]
    public void Every_number_of_the_table_is_that_of_the_reference(string dataset)
    {
        var table = Of(dataset);
        var fit = RepeatedMeasuresAnova.Fit(table.Sample(), new Scratch());
        (string Quantity, double Value)[] numbers =
        [
            ("n", fit.Subjects), ("k", fit.Visits), ("F", fit.F), ("df1", fit.VisitDegrees), ("df2", fit.ErrorDegrees),
            ("p", fit.P(SphericityCorrection.None).Value), ("p_gg", fit.P(SphericityCorrection.GreenhouseGeisser).Value),
            ("p_hf", fit.P(SphericityCorrection.HuynhFeldt).Value), ("p_lower_bound", fit.P(SphericityCorrection.LowerBound).Value),
            ("ss_treatment", fit.VisitSquares), ("ss_subject", fit.SubjectSquares), ("ss_error", fit.ErrorSquares),
            ("eps_gg", fit.GreenhouseGeisser), ("eps_hf", fit.HuynhFeldt), ("eps_hf_capped", fit.Epsilon(SphericityCorrection.HuynhFeldt)),
            ("eps_lower_bound", fit.Epsilon(SphericityCorrection.LowerBound)), ("partial_eta2", fit.PartialEtaSquared),
            ("mauchly_W", fit.Sphericity.W), ("mauchly_chi2", fit.Sphericity.ChiSquared), ("mauchly_df", fit.Sphericity.DegreesOfFreedom),
            ("mauchly_p_first_order", fit.Sphericity.FirstOrderP.Value), ("mauchly_p", fit.Sphericity.P.Value),
        ];
        foreach (var (quantity, value) in numbers)
            Expected.Check(value, dataset, "rm_anova", quantity);

        // What is left of the 24 is another program's variant: its second-order term and its four printed digits.
        Assert.Equal(22, numbers.Length);
        Assert.True(Expected.Has(dataset, "rm_anova", "mauchly_p_as_R") && Expected.Has(dataset, "rm_anova", "eps_gg_printed_by_anova_mlm"));
    }

    [Theory]
    [InlineData("ergostool")]
    [InlineData("orthodont")]
    [InlineData("sleepstudy")]
    [InlineData("rounding_times")]
    public void The_three_tests_report_the_statistic_and_their_own_p(string dataset)
    {
        var table = Of(dataset);
        var scratch = new Scratch();
        var corrected = RepeatedMeasuresAnova.GreenhouseGeisser(table.Sample(), TestOptions.Default, scratch);
        var feldt = RepeatedMeasuresAnova.HuynhFeldt(table.Sample(), TestOptions.Default, scratch);
        var raw = RepeatedMeasuresAnova.Uncorrected(table.Sample(), TestOptions.Default, scratch);
        Expected.Check(corrected.Statistic, dataset, "rm_anova", "F");
        Expected.Check(corrected.P.Value, dataset, "rm_anova", "p_gg");
        Expected.Check(feldt.P.Value, dataset, "rm_anova", "p_hf");
        Expected.Check(raw.P.Value, dataset, "rm_anova", "p");
        Expected.Check(raw.DenominatorDegreesOfFreedom, dataset, "rm_anova", "df2");
    }

    private static VisitTables Of(string dataset) => dataset switch
    {
        "ergostool" => VisitTables.ErgoStool(),
        "orthodont" => VisitTables.Orthodont(),
        "sleepstudy" => VisitTables.SleepStudy(),
        _ => VisitTables.RoundingTimes(),
    };
}
