using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>Published data with repeated visits, from a long sheet to the results (sources in expected.csv).</summary>
public class VisitReferenceTests
{
    private const string Methods = "[mixed-model, rm-anova, rm-anova-hf, rm-anova-raw, friedman, linear-trend, page-trend]";

    [Theory]
    [InlineData("orthodont", 0, 2, 3)]
    [InlineData("sleepstudy", 0, 1, 2)]
    [InlineData("ergostool", 0, 1, 2)]
    public void All_visits_at_once_agree_with_the_values_from_outside(string dataset, int subject, int visit, int value)
    {
        using StudyFolder folder = Study(dataset, subject, visit, value);
        ResultsTable results = folder.Results();
        DetailsTable details = DetailsTable.Read(folder.At("results/details.parquet"));
        double Omnibus(string method, string column) => results.Number(results.Row("y", "omnibus", "", method), column);

        ReferenceValues.Equal(dataset, "rm_anova", "F", Omnibus("rm-anova", "statistic"));
        ReferenceValues.Equal(dataset, "rm_anova", "p_gg", Omnibus("rm-anova", "p_value"));
        ReferenceValues.Equal(dataset, "rm_anova", "p_hf", Omnibus("rm-anova-hf", "p_value"));
        ReferenceValues.Equal(dataset, "rm_anova", "p", Omnibus("rm-anova-raw", "p_value"));
        ReferenceValues.Equal(dataset, "rm_anova", "eps_gg", details.Number("y", "omnibus", "rm-anova", "greenhouse-geisser-epsilon"));
        ReferenceValues.Equal(dataset, "rm_anova", "mauchly_W", details.Number("y", "omnibus", "rm-anova", "mauchly-w"));
        ReferenceValues.Equal(dataset, "friedman", "chi2", Omnibus("friedman", "statistic"));
        ReferenceValues.Equal(dataset, "friedman", "p", Omnibus("friedman", "p_value"));
        ReferenceValues.Equal(dataset, "friedman", "kendall_W", details.Number("y", "omnibus", "friedman", "kendall-w"));
        ReferenceValues.Equal(dataset, "friedman", "iman_davenport_F", details.Number("y", "omnibus", "friedman", "iman-davenport-f"));
        ReferenceValues.Equal(dataset, "lmm_visit_factor", "F_visit", Omnibus("mixed-model", "statistic"));
        ReferenceValues.Equal(dataset, "lmm_visit_factor", "F_visit_df2", Omnibus("mixed-model", "df2"));
        ReferenceValues.Equal(dataset, "lmm_visit_factor", "F_visit_p", Omnibus("mixed-model", "p_value"));
    }

    [Theory]
    [InlineData("orthodont", 2, 3, "10", "8")]
    [InlineData("orthodont", 2, 3, "14", "8")]
    [InlineData("sleepstudy", 1, 2, "9", "0")]
    [InlineData("ergostool", 1, 2, "T3", "T1")]
    public void Two_visits_in_the_mixed_model_agree_with_the_values_from_outside(string dataset, int visit, int value, string index, string reference)
    {
        using StudyFolder folder = Study(dataset, 0, visit, value);
        ResultsTable results = folder.Results();
        DetailsTable details = DetailsTable.Read(folder.At("results/details.parquet"));
        int row = results.Row("y", $"{index}-{reference}", "", "mixed-model");
        ReferenceValues.Equal(dataset, "lmm_visit_factor", $"coef.visit{index}", results.Number(row, "estimate"));
        ReferenceValues.Equal(dataset, "lmm_visit_factor", $"se.visit{index}", results.Number(row, "standard_error"));
        ReferenceValues.Equal(dataset, "lmm_visit_factor", $"t.visit{index}", results.Number(row, "statistic"));
        string first = results.Text(0, "contrast");
        ReferenceValues.Equal(dataset, "lmm_visit_factor", "var_subject", details.Number("y", first, "mixed-model", "variance-between"));
        ReferenceValues.Equal(dataset, "lmm_visit_factor", "var_resid", details.Number("y", first, "mixed-model", "variance-within"));
    }

    [Fact]
    public void Visits_that_are_named_by_numbers_give_slopes_per_unit()
    {
        // Potthoff and Roy 1964: 0.6602 mm a year, the slope of the random-intercept line through ages 8 to 14.
        using StudyFolder folder = Study("orthodont", 0, 2, 3);
        ResultsTable results = folder.Results();
        ReferenceValues.Equal("orthodont", "lmm_random_intercept", "coef.age", results.Number(results.Row("y", "trend", "", "mixed-model"), "estimate"));
        Assert.Equal(results.Number(results.Row("y", "trend", "", "mixed-model"), "estimate"), results.Number(results.Row("y", "trend", "", "linear-trend"), "estimate"), 1e-12);
    }

    private static StudyFolder Study(string dataset, int subject, int visit, int value)
    {
        string[][] data = ReferenceValues.Data(dataset);
        var folder = new StudyFolder();
        folder.Write("sheet.csv", "person,visit,y\n" + string.Concat(data.Select(row => $"{row[subject]},{row[visit]},{row[value]}\n")));
        string order = string.Join(", ", data.Select(row => row[visit]).Distinct().Select(text => $"\"{text}\""));
        folder.Write("study.yaml", $$"""
            schema: 1
            study: {name: {{dataset}}}
            data: {samples: sheet.csv}
            design:
              kind: visits
              subject: person
              visit: {column: visit, order: [{{order}}]}
              contrasts: [each-vs-reference, trend, omnibus]
            analysis: {continuous: {{Methods}} }
            output: {folder: results}
            """);
        Finished run = folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        return folder;
    }
}
