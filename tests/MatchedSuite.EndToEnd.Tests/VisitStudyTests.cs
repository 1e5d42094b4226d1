using System.Globalization;
using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>Four visits of the liver trial (Inputs/pbc/README.md) through the executable; values of all visits at once by base R 4.2.2 (Inputs/pbc/visits.R).</summary>
public sealed class VisitStudyTests : IDisposable
{
    private readonly StudyFolder _folder = StudyFolder.Of("pbc");
    private readonly Finished _run;

    public VisitStudyTests()
    {
        _run = _folder.Run("analyze", "visits.yaml");
        Assert.True(_run.ExitCode == 0, _run.Error);
    }

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void Two_visits_are_compared_as_pairs_are()
    {
        Assert.Equal(0, _folder.Run("analyze", "study.yaml", "--out", "pairs").ExitCode);
        ResultsTable visits = _folder.Results();
        ResultsTable pairs = _folder.Results("pairs");
        string[] same = [.. pairs.Columns.Where(column => column != "contrast" && !column.Contains("holm", StringComparison.Ordinal) && !column.Contains("bh", StringComparison.Ordinal))];
        for (int row = 0; row < pairs.Rows; row++)
        {
            int other = visits.Row(pairs.Text(row, "endpoint"), "year1-baseline", "", pairs.Text(row, "method"));
            Assert.All(same, column => Assert.Equal(pairs.Text(row, column), visits.Text(other, column)));
        }

        Assert.Equal(24, pairs.Rows);
    }

    [Fact]
    public void All_visits_at_once_agree_with_base_R()
    {
        ResultsTable results = _folder.Results();
        DetailsTable details = DetailsTable.Read(_folder.At("results/details.parquet"));
        string[][] expected = [.. File.ReadAllLines(_folder.At("pbc-visits-expected.csv")).Skip(1).Select(line => line.Split(','))];
        Assert.Equal(4, expected.Length);
        foreach (string[] row in expected)
        {
            int anova = results.Row(row[0], "omnibus", "", "rm-anova");
            Assert.Equal(row[1].Trim(), results.Text(anova, "n_sets"));
            Close(row[2], results.Number(anova, "statistic"));
            Close(row[3], details.Number(row[0], "omnibus", "rm-anova", "greenhouse-geisser-epsilon"));
            Close(row[4], results.Number(anova, "df"));
            Close(row[5], results.Number(anova, "df2"));
            Close(row[6], results.Number(anova, "p_value"));
            Close(row[7], details.Number(row[0], "omnibus", "rm-anova", "mauchly-w"));
            Close(row[9], results.Number(results.Row(row[0], "omnibus", "", "friedman"), "statistic"));
            Close(row[10], results.Number(results.Row(row[0], "omnibus", "", "friedman"), "p_value"));
            int trend = results.Row(row[0], "trend", "", "linear-trend");
            Close(row[11], results.Number(trend, "estimate"));
            Close(row[12], results.Number(trend, "statistic"));
            Close(row[13], results.Number(trend, "p_value"));
        }
    }

    [Fact]
    public void The_mixed_model_uses_every_subject_and_says_how_alike_visits_are()
    {
        ResultsTable results = _folder.Results();
        int row = results.Row("bilirubin", "year1-baseline", "", "mixed-model");
        Assert.Equal(("284", "1001", "0"), (results.Text(row, "n_sets"), results.Text(row, "n_samples"), results.Text(row, "n_missing")));
        DetailsTable details = DetailsTable.Read(_folder.At("results/details.parquet"));
        double Of(string quantity) => details.Number("bilirubin", "month6-baseline", "mixed-model", quantity);
        Assert.Equal(Of("variance-between") / (Of("variance-between") + Of("variance-within")), Of("intraclass-correlation"), 1e-12);
        Assert.InRange(Of("intraclass-correlation"), Of("intraclass-correlation-low"), Of("intraclass-correlation-high"));
        Assert.Equal(7, details.Count("variance-between"));
    }

    [Fact]
    public void The_first_method_that_makes_a_comparison_is_its_primary_one()
    {
        ResultsTable results = _folder.Results();
        (string Contrast, string Method)[] primary = [.. Enumerable.Range(0, results.Rows)
            .Where(row => results.Text(row, "endpoint") == "albumin" && results.Text(row, "primary") == "true")
            .Select(row => (results.Text(row, "contrast"), results.Text(row, "method")))];
        Assert.Equal(
            [
                ("month6-baseline", "paired-t"), ("year1-baseline", "paired-t"), ("year2-baseline", "paired-t"),
                ("year1-month6", "paired-t"), ("year2-year1", "paired-t"), ("trend", "mixed-model"), ("omnibus", "mixed-model"),
            ],
            primary);
    }

    [Fact]
    public void Audit_and_summary_speak_of_visits()
    {
        string matching = _folder.Read("results/audit/matching.md");
        Assert.Contains("| yes | yes | yes | yes | 184 |", matching, StringComparison.Ordinal);
        Assert.Contains("| no-partner | −28 | 1001 |", matching, StringComparison.Ordinal);
        Assert.Contains("may be time itself", _folder.Read("results/summary.md"), StringComparison.Ordinal);
        Assert.Contains("no method compares binary endpoints by 'trend'", _run.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void Threads_change_no_byte()
    {
        Assert.Equal(0, _folder.Run("analyze", "visits.yaml", "--threads", "1", "--out", "one").ExitCode);
        Assert.Equal(0, _folder.Run("analyze", "visits.yaml", "--threads", "5", "--memory", "64MiB", "--out", "five").ExitCode);
        foreach (string file in (string[])["results.parquet", "results.csv", "summary.csv", "details.parquet", "audit/matching.md"])
            Assert.True(File.ReadAllBytes(_folder.At($"one/{file}")).SequenceEqual(File.ReadAllBytes(_folder.At($"five/{file}"))), file);
    }

    [Fact]
    public void Max_t_flips_the_subjects_of_each_comparison_as_it_flips_pairs()
    {
        const string Exclude = "exclude: [ascites, hepatomegaly, spiders, ";
        _folder.Change("visits.yaml", "exclude: [", Exclude);
        _folder.Change("visits.yaml", "contrasts: [each-vs-reference, successive, trend, omnibus]", "contrasts: [each-vs-reference]");
        _folder.Change("visits.yaml", "adjust: [holm, bh]", "adjust: [holm, max-t, min-p]");
        _folder.Change("visits.yaml", "  dictionary: endpoints.csv", "  dictionary: unsigned.csv");
        _folder.Write("unsigned.csv", string.Join('\n', File.ReadAllLines(_folder.At("endpoints.csv")).Where(line => !line.Contains("binary", StringComparison.Ordinal))));
        _folder.Change("study.yaml", "exclude: [", Exclude);
        _folder.Change("study.yaml", "adjust: [holm, bh]", "adjust: [holm, max-t, min-p]");
        _folder.Change("study.yaml", "  dictionary: endpoints.csv", "  dictionary: unsigned.csv");
        Finished visits = _folder.Run("analyze", "visits.yaml", "--out", "visits", "--seed", "5");
        Finished pairs = _folder.Run("analyze", "study.yaml", "--out", "pairs", "--seed", "5");
        Assert.True(visits.ExitCode == 0 && pairs.ExitCode == 0, visits.Error + pairs.Error);
        ResultsTable found = _folder.Results("visits");
        ResultsTable expected = _folder.Results("pairs");
        int compared = 0;
        for (int row = 0; row < expected.Rows; row++)
        {
            if (expected.Text(row, "primary") != "true")
                continue;
            int other = found.Row(expected.Text(row, "endpoint"), "year1-baseline", "", expected.Text(row, "method"));
            Assert.Equal(expected.Text(row, "p_max_t"), found.Text(other, "p_max_t"));
            Assert.Equal(expected.Text(row, "p_min_p"), found.Text(other, "p_min_p"));
            Assert.NotEqual("", found.Text(other, "p_max_t"));
            compared++;
        }

        Assert.Equal(9, compared);
    }

    [Fact]
    public void A_covariate_that_never_changes_is_named_once_and_adjusts_the_mixed_model_alone()
    {
        _folder.Change("visits.yaml", "  contrasts:", "  covariates: [age]\n  contrasts:");
        _folder.Change("visits.yaml", "exclude: [arm, age, sex]", "exclude: [arm, sex]");
        Finished run = _folder.Run("analyze", "visits.yaml", "--out", "adjusted");
        Assert.True(run.ExitCode == 0, run.Error);
        Assert.Single(run.Error.Split('\n'), line => line.Contains("covariate 'age' does not change between the visits of 'month6-baseline', 'year1-baseline'", StringComparison.Ordinal));
        ResultsTable adjusted = _folder.Results("adjusted");
        ResultsTable plain = _folder.Results();
        int pairs = adjusted.Row("albumin", "year1-baseline", "", "paired-t");
        Assert.Equal(plain.Number(plain.Row("albumin", "year1-baseline", "", "paired-t"), "estimate"), adjusted.Number(pairs, "estimate"), 1e-12);
        Assert.Contains("collinear-covariate", adjusted.Text(pairs, "flags"), StringComparison.Ordinal);
        int mixed = adjusted.Row("albumin", "year1-baseline", "", "mixed-model");
        Assert.NotEqual(plain.Number(plain.Row("albumin", "year1-baseline", "", "mixed-model"), "estimate"), adjusted.Number(mixed, "estimate"));
        Assert.DoesNotContain("unadjusted", adjusted.Text(mixed, "flags"), StringComparison.Ordinal);
        Assert.Contains("unadjusted", adjusted.Text(adjusted.Row("albumin", "omnibus", "", "friedman"), "flags"), StringComparison.Ordinal);
    }

    [Fact]
    public void Max_t_refuses_comparisons_whose_primary_method_does_not_flip()
    {
        _folder.Change("visits.yaml", "adjust: [holm, bh]", "adjust: [max-t]");
        Finished run = _folder.Run("check", "visits.yaml");
        Assert.Equal(2, run.ExitCode);
        Assert.Contains("'mixed-model', the primary method of continuous endpoints", run.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void Hypotheses_of_all_comparisons_are_adjusted_together_on_request()
    {
        _folder.Change("visits.yaml", "adjust: [holm, bh]", "adjust: [bonferroni]\n  across: contrasts");
        Assert.Equal(0, _folder.Run("analyze", "visits.yaml", "--out", "across").ExitCode);
        ResultsTable results = _folder.Results("across");
        int[] primary = [.. Enumerable.Range(0, results.Rows).Where(row => results.Text(row, "primary") == "true" && results.Text(row, "p_value").Length > 0)];
        Assert.InRange(primary.Length, 70, (7 * 12) - 3); // no trend of the three signs; a few comparisons in which nothing differs
        Assert.All(primary, row => Assert.Equal(Math.Min(1, primary.Length * results.Number(row, "p_value")), results.Number(row, "p_bonferroni"), 1e-12));
    }

    [Fact]
    public void The_demo_finds_what_was_planted_and_shows_every_blemish()
    {
        using var folder = new StudyFolder();
        Finished run = folder.Run("demo", "--design", "visits", "--out", "demo");
        Assert.True(run.ExitCode == 0, run.Error);
        Dictionary<string, bool> planted = File.ReadAllLines(folder.At("demo/truth.csv")).Skip(1).Select(line => line.Split(',')).ToDictionary(cells => cells[0], cells => cells[1] != "0");
        ResultsTable results = folder.Results("demo/results");
        int[] found = [.. Enumerable.Range(0, results.Rows).Where(row =>
            results.Text(row, "contrast") == "week30-start" && results.Text(row, "stratum").Length == 0 && results.Text(row, "primary") == "true" && results.Text(row, "rejected_holm") == "true")];
        Assert.True(found.Count(row => planted[results.Text(row, "endpoint")]) >= 10, $"{found.Length} found");
        Assert.True(found.Count(row => !planted[results.Text(row, "endpoint")]) <= 1);
        string matching = folder.Read("demo/results/audit/matching.md");
        Assert.All((string[])["role-missing", "outside-window", "duplicate-place", "no-partner"], code => Assert.Contains(code, matching, StringComparison.Ordinal));
        Assert.Contains("sal-44", folder.Read("demo/results/audit/untested.csv"), StringComparison.Ordinal);
    }

    [Fact]
    public void Strata_have_rows_of_their_own_and_estimates_are_compared_between_them()
    {
        _folder.Change("visits.yaml", "  contrasts:", "  stratum: sex\n  contrasts:");
        Assert.Equal(0, _folder.Run("analyze", "visits.yaml", "--out", "strata").ExitCode);
        ResultsTable results = _folder.Results("strata");
        int women = results.Row("albumin", "year1-baseline", "f", "mixed-model");
        int men = results.Row("albumin", "year1-baseline", "m", "mixed-model");
        int between = results.Row("albumin", "year1-baseline", "difference", "mixed-model");
        Assert.Equal(results.Number(women, "estimate") - results.Number(men, "estimate"), results.Number(between, "estimate"), 1e-12);
        Assert.Equal(184, results.Number(results.Row("albumin", "omnibus", "f", "rm-anova"), "n_sets") + results.Number(results.Row("albumin", "omnibus", "m", "rm-anova"), "n_sets"));
    }

    [Theory]
    [InlineData("contrasts: [each-vs-reference, successive, trend, omnibus]", "contrasts: [omnibus]\n  period: {column: x, order: [1, 2]}", "'period'")]
    [InlineData("mixed-model, rm-anova, friedman, linear-trend, page-trend]\n  binary", "sign]\n  binary", "none of 'paired-t', 'signed-rank', 'sign' makes the comparison 'trend'")]
    [InlineData("order: [baseline, month6, year1, year2]", "order: [baseline, month6, year1, year3]", "'year3'")]
    [InlineData("from: 0, to: 0", "from: 1, to: 2", "samples of two visits")]
    [InlineData("column: day,", "column: patient,", "is not a number")]
    public void Bad_visits_are_refused_with_one_message(string found, string replacement, string named)
    {
        _folder.Change("visits.yaml", found, replacement);
        if (replacement.Contains("from: 1", StringComparison.Ordinal))
            _folder.Change("visits.yaml", "order: [baseline, month6, year1, year2]", "order: [baseline, month6]");
        Finished run = _folder.Run("analyze", "visits.yaml", "--out", "none");
        Assert.Equal(2, run.ExitCode);
        Assert.Contains(named, run.Error, StringComparison.Ordinal);
        Assert.Contains("xpected ", Assert.Single(run.Error.Split('\n', StringSplitOptions.RemoveEmptyEntries)), StringComparison.Ordinal);
        Assert.False(Directory.Exists(_folder.At("none")));
    }

    [Fact]
    public void Check_names_the_comparisons_and_refuses_those_that_no_method_makes()
    {
        Finished check = _folder.Run("check", "visits.yaml");
        Assert.Contains("month6-baseline, year1-baseline, year2-baseline, year1-month6, year2-year1, trend, omnibus", check.Output, StringComparison.Ordinal);
        _folder.Change("visits.yaml", "cochran-q", "mcnemar-midp");
        Finished refused = _folder.Run("check", "visits.yaml");
        Assert.Equal(2, refused.ExitCode);
        Assert.Contains("one of 'cochran-q'", refused.Error, StringComparison.Ordinal);
    }

    private static void Close(string expected, double found)
    {
        double value = double.Parse(expected, CultureInfo.InvariantCulture);
        Assert.True(Math.Abs(found - value) <= 1e-10 * Math.Abs(value), $"expected {expected}, found {found:R}");
    }
}
