using System.Globalization;
using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>Fleming and Harrington 1991, Murtaugh et al. 1994: a liver trial, one year against baseline; values by base R 4.2.2 (Inputs/pbc/README.md).</summary>
public sealed class RealStudyTests : IDisposable
{
    private const double Tolerance = 1e-10;

    // Tested exactly, where the expected column holds the normal approximation; the decimal table has the exact p.
    private static readonly string[] TieFree = ["cholesterol", "alk_phos"];

    // Their expected signed ranks were taken on binary differences, in which decimal ties are lost.
    private static readonly string[] DecimalTiesSplit = ["bilirubin", "albumin", "ast", "platelets", "protime"];
    private readonly StudyFolder _folder = StudyFolder.Of("pbc");

    public RealStudyTests()
    {
        Finished run = _folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
    }

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void Continuous_endpoints_agree_with_base_R()
    {
        ResultsTable results = _folder.Results();
        string[][] expected = Expected("pbc-year1-continuous-expected.csv");
        Assert.Equal(7, expected.Length);
        foreach (string[] row in expected)
        {
            Assert.Equal(row[2].Trim(), results.Text(row[0], "paired-t", "n_sets"));
            Close(row[3], results.Number(row[0], "paired-t", "estimate"));
            Close(row[4], results.Number(row[0], "paired-t", "standard_error"));
            Close(row[5], results.Number(row[0], "paired-t", "statistic"));
            Close(row[6], results.Number(row[0], "paired-t", "df"));
            Close(row[7], results.Number(row[0], "paired-t", "ci_low"));
            Close(row[8], results.Number(row[0], "paired-t", "ci_high"));
            Close(row[9], results.Number(row[0], "paired-t", "p_value"));
            if (DecimalTiesSplit.Contains(row[0]))
                continue;
            Close(row[10], results.Number(row[0], "signed-rank", "statistic"));
            if (!TieFree.Contains(row[0]))
                Close(row[11], results.Number(row[0], "signed-rank", "p_value"));
        }
    }

    [Fact]
    public void Signed_ranks_agree_with_base_R_once_decimal_ties_are_restored()
    {
        ResultsTable results = _folder.Results();
        string[][] expected = Expected("pbc-year1-signed-rank-decimal-expected.csv");
        Assert.Equal(7, expected.Length);
        foreach (string[] row in expected)
        {
            Close(row[1], results.Number(row[0], "signed-rank", "statistic"));
            Close(row[2], results.Number(row[0], "signed-rank", "p_value"));
        }
    }

    [Fact]
    public void Adjusted_p_values_of_the_continuous_endpoints_agree_with_base_R()
    {
        _folder.Change("study.yaml", "exclude: [", "exclude: [ascites, hepatomegaly, spiders, edema, stage, ");
        Finished run = _folder.Run("analyze", "study.yaml", "--out", "seven");
        Assert.True(run.ExitCode == 0, run.Error);
        ResultsTable results = _folder.Results("seven");
        foreach (string[] row in Expected("pbc-year1-continuous-expected.csv"))
        {
            Close(row[12], results.Number(row[0], "paired-t", "p_holm"));
            Close(row[13], results.Number(row[0], "paired-t", "p_bh"));
        }
    }

    [Fact]
    public void Logarithms_are_given_back_as_ratios()
    {
        ResultsTable results = _folder.Results();
        Close("0.8171906", results.Number("alk_phos", "paired-t", "ratio"), 1e-6); // exp(-0.2018826), by hand
        Assert.Equal("", results.Text("albumin", "paired-t", "ratio"));
    }

    [Fact]
    public void Binary_endpoints_agree_with_base_R()
    {
        ResultsTable results = _folder.Results();
        string[][] expected = Expected("pbc-year1-binary-expected.csv");
        Assert.Equal(3, expected.Length);
        foreach (string[] row in expected)
        {
            Assert.Equal(row[1].Trim(), results.Text(row[0], "mcnemar-exact", "n_sets"));
            Close(row[4], results.Number(row[0], "mcnemar-exact", "ratio"));
            Close(row[5], results.Number(row[0], "mcnemar-exact", "p_value"));
            Close(row[6], results.Number(row[0], "mcnemar", "statistic"));
        }
    }

    [Fact]
    public void Ordinal_endpoints_are_tested_on_their_codes()
    {
        ResultsTable results = _folder.Results();
        Assert.Equal("ordinal", results.Text("stage", "signed-rank", "kind"));
        Assert.InRange(results.Number("stage", "signed-rank", "p_value"), 0, 1);
        Assert.InRange(results.Number("edema", "sign", "p_value"), 0, 1);
    }

    [Fact]
    public void The_summary_tells_that_a_change_may_be_time_itself()
    {
        Assert.Contains("may be time itself", _folder.Read("results/summary.md"), StringComparison.Ordinal);
    }

    private static void Close(string expected, double found, double tolerance = Tolerance)
    {
        double value = double.Parse(expected, CultureInfo.InvariantCulture);
        Assert.True(Math.Abs(found - value) <= tolerance * Math.Abs(value), $"expected {expected}, found {found:R}");
    }

    private string[][] Expected(string file) => [.. File.ReadAllLines(_folder.At(file)).Skip(1).Select(line => line.Split(','))];
}
