using System.Globalization;
using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>Changes compared between the arms of the liver trial, by base R 4.2.2 (Inputs/pbc/arms.R), and of the anorexia trial (sources in expected.csv).</summary>
public class ArmStudyTests
{
    private static readonly string[] Compared = ["estimate", "standard_error", "ci_low", "ci_high", "statistic", "df", "p_value"];

    [Fact]
    public void Every_row_of_the_liver_trial_agrees_with_base_R()
    {
        using StudyFolder folder = Analysed(out _);
        ResultsTable results = folder.Results();
        string[][] expected = [.. File.ReadAllLines(folder.At("pbc-arms-expected.csv")).Skip(1).Select(line => line.Split(',').Select(cell => cell.Trim()).ToArray())];
        Assert.Equal(60, expected.Length);
        Assert.Equal(60, results.Rows);
        foreach (string[] row in expected)
        {
            int found = results.Row(row[0], row[1], row[2], row[3]);
            Assert.Equal(row[4], results.Text(found, "n_sets"));
            for (int column = 0; column < Compared.Length; column++)
            {
                if (row[column + 5] != "NA")
                    Close(row[column + 5], results.Number(found, Compared[column]), string.Join(' ', row[..4]));
            }
        }
    }

    [Fact]
    public void Paired_results_of_an_arm_stand_beside_and_are_not_primary()
    {
        using StudyFolder folder = Analysed(out _);
        ResultsTable results = folder.Results();
        int arm = results.Row("albumin", "year1-baseline", "placebo", "paired-t");
        Assert.Equal("false", results.Text(arm, "primary"));
        Assert.Equal("true", results.Text(results.Row("albumin", "year1-baseline:penicillamine-placebo", "", "change-ancova"), "primary"));
        string[] summary = File.ReadAllLines(folder.At("results/summary.csv"));
        Assert.Equal(1 + (4 * 3), summary.Length);
        Assert.All(summary.Skip(1), line => Assert.Contains(":penicillamine-placebo", line, StringComparison.Ordinal));
    }

    [Fact]
    public void Balance_before_treatment_is_told_of_covariates_and_endpoints()
    {
        using StudyFolder folder = Analysed(out _);
        Assert.Contains("| age | 140 | 51.28 (10.81) | 144 | 47.98 (9.664) | 0.3226 |", folder.Read("results/audit/matching.md"), StringComparison.Ordinal);
        DetailsTable details = DetailsTable.Read(folder.At("results/details.parquet"));
        const string Contrast = "year1-baseline:penicillamine-placebo";
        double Of(string quantity) => details.Number("bilirubin", Contrast, "", quantity);
        double spread = Math.Sqrt(((Of("baseline-index-sd") * Of("baseline-index-sd")) + (Of("baseline-reference-sd") * Of("baseline-reference-sd"))) / 2);
        Assert.Equal((Of("baseline-index-mean") - Of("baseline-reference-mean")) / spread, Of("baseline-standardised-difference"), 1e-12);
        Assert.Contains("only where chance put the subjects into the arms", folder.Read("results/summary.md"), StringComparison.Ordinal);
        Assert.Contains("unadjusted", folder.Results().Text(0, "flags"), StringComparison.Ordinal);
    }

    [Fact]
    public void Threads_change_no_byte()
    {
        using StudyFolder folder = Analysed(out _);
        Assert.Equal(0, folder.Run("analyze", "arms.yaml", "--threads", "1", "--out", "one").ExitCode);
        foreach (string file in (string[])["results.parquet", "results.csv", "summary.csv", "details.parquet"])
            Assert.True(File.ReadAllBytes(folder.At($"one/{file}")).SequenceEqual(File.ReadAllBytes(folder.At($"results/{file}"))), file);
    }

    [Theory]
    [InlineData("CBT")]
    [InlineData("FT")]
    public void Anorexia_agrees_with_the_values_from_outside(string treatment)
    {
        using var folder = new StudyFolder();
        folder.Write("sheet.csv", "person,arm,visit,weight\n" + string.Concat(ReferenceValues.Data("anorexia")
            .Select(row => $"{row[0]},{row[1]},before,{row[2]}\n{row[0]},{row[1]},after,{row[3]}\n")));
        folder.Write("study.yaml", $$"""
            schema: 1
            study: {name: Anorexia}
            data: {samples: sheet.csv}
            design:
              kind: change-by-arm
              subject: person
              visit: {column: visit, order: [before, after]}
              arm: {column: arm, index: {{treatment}}, reference: Cont}
            analysis: {continuous: [change-ancova, change-welch, paired-t, signed-rank]}
            output: {folder: results}
            """);
        Finished run = folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        ResultsTable results = folder.Results();
        string dataset = $"anorexia_{treatment}_vs_Cont";
        double Between(string method, string column) => results.Number(results.Row("weight", $"after-before:{treatment}-Cont", "", method), column);
        ReferenceValues.Equal(dataset, "change_welch_t", "diff", Between("change-welch", "estimate"));
        ReferenceValues.Equal(dataset, "change_welch_t", "df", Between("change-welch", "df"));
        ReferenceValues.Equal(dataset, "change_welch_t", "p_two", Between("change-welch", "p_value"));
        ReferenceValues.Equal(dataset, "ancova", "coef.arm", Between("change-ancova", "estimate"));
        ReferenceValues.Equal(dataset, "ancova", "ci95_lo.arm", Between("change-ancova", "ci_low"));
        ReferenceValues.Equal(dataset, "ancova", "p.arm", Between("change-ancova", "p_value"));
        int arm = results.Row("weight", "after-before", treatment, "paired-t");
        ReferenceValues.Equal($"anorexia_{treatment}", "paired_t", "mean_diff", results.Number(arm, "estimate"));
        ReferenceValues.Equal($"anorexia_{treatment}", "paired_t", "p_two", results.Number(arm, "p_value"));
        DetailsTable details = DetailsTable.Read(folder.At("results/details.parquet"));
        ReferenceValues.Equal(dataset, "ancova", "coef.before", details.Number("weight", $"after-before:{treatment}-Cont", "", "baseline-slope"));
    }

    [Theory]
    [InlineData("[change-ancova, change-welch, change-rank-sum, paired-t]", "[paired-t]", "none of 'paired-t' compares the arms")]
    [InlineData("index: penicillamine", "index: Penicillamine", "'penicillamine'")]
    [InlineData("column: arm", "column: arms", "'arm'")]
    [InlineData("  arm:", "  contrasts: [omnibus]\n  arm:", "'contrasts'")]
    public void Bad_arms_are_refused_with_one_message(string found, string replacement, string named)
    {
        using StudyFolder folder = StudyFolder.Of("pbc");
        folder.Change("arms.yaml", found, replacement);
        Finished run = folder.Run("analyze", "arms.yaml");
        Assert.Equal(2, run.ExitCode);
        Assert.Contains(named, Assert.Single(run.Error.Split('\n', StringSplitOptions.RemoveEmptyEntries)), StringComparison.Ordinal);
        Assert.False(Directory.Exists(folder.At("results")));
    }

    private static StudyFolder Analysed(out Finished run)
    {
        StudyFolder folder = StudyFolder.Of("pbc");
        run = folder.Run("analyze", "arms.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        return folder;
    }

    private static void Close(string expected, double found, string what)
    {
        double value = double.Parse(expected, CultureInfo.InvariantCulture);
        Assert.True(Math.Abs(found - value) <= 1e-10 * Math.Max(Math.Abs(value), 1e-4), $"{what}: expected {expected}, found {found:R}");
    }
}
