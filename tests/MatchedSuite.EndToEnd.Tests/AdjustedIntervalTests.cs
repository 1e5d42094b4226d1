using System.Globalization;
using System.Text.Json;
using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>Intervals and bounds that depend on all p-values of a run.</summary>
public class AdjustedIntervalTests
{
    [Theory]
    [InlineData("paired-t")]
    [InlineData("signed-rank")]
    public void Simultaneous_and_false_coverage_intervals_are_the_methods_own_at_their_confidence(string method)
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Change("study.yaml", "continuous: [paired-t, signed-rank], adjust: [bonferroni, holm, bh]", $"continuous: [{method}], adjust: [holm, bh], fdr: 0.2, intervals: [simultaneous, fcr]");
        Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
        ResultsTable adjusted = folder.Results();
        string[] endpoints = ["crp", "il6", "tnf", "alb"];
        int discoveries = endpoints.Count(endpoint => adjusted.Text(endpoint, method, "rejected_bh") == "true");
        Assert.InRange(discoveries, 1, 3);
        ResultsTable simultaneous = Marginal(folder, 1 - (0.05 / 4), "simultaneous");
        ResultsTable coverage = Marginal(folder, 1 - (discoveries * 0.2 / 4), "coverage");
        foreach (string endpoint in endpoints)
        {
            bool isDiscovery = adjusted.Text(endpoint, method, "rejected_bh") == "true";
            foreach (string end in (string[])["low", "high"])
            {
                Assert.Equal(simultaneous.Number(endpoint, method, $"ci_{end}"), adjusted.Number(endpoint, method, $"ci_sim_{end}"), 1e-9);
                Assert.Equal(isDiscovery, adjusted.Text(endpoint, method, $"ci_fcr_{end}").Length > 0);
                if (isDiscovery)
                    Assert.Equal(coverage.Number(endpoint, method, $"ci_{end}"), adjusted.Number(endpoint, method, $"ci_fcr_{end}"), 1e-9);
            }
        }
    }

    [Fact]
    public void Without_the_key_there_are_no_such_columns()
    {
        using StudyFolder folder = StudyFolder.Small();
        Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
        Assert.DoesNotContain(folder.Results().Columns, column => column.StartsWith("ci_fcr", StringComparison.Ordinal) || column.StartsWith("ci_sim", StringComparison.Ordinal));
    }

    [Fact]
    public void Discoveries_are_bounded_in_every_top_list_and_family()
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Write("markers.csv", "endpoint,family\ncrp,first\nil6,first\ntnf,second\nalb,second\n");
        folder.Change("study.yaml", "analysis:", "endpoints: {dictionary: markers.csv}\nanalysis:");
        folder.Change("study.yaml", "[bonferroni, holm, bh]", "[hommel]");
        Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
        ResultsTable results = folder.Results();
        ResultsTable top = ResultsTable.Read(folder.At("results/discoveries.csv"));
        Assert.Equal(4, top.Rows);
        int before = 0;
        for (int k = 1; k <= 4; k++)
        {
            Assert.Equal($"{k}", top.Text(k - 1, "k"));
            int bound = int.Parse(top.Text(k - 1, "true_discoveries"), CultureInfo.InvariantCulture);
            Assert.InRange(bound, before, before + 1);
            before = bound;
        }

        Assert.Contains($"at least {before} of 4 differ, with confidence 95 %", folder.Read("results/summary.md"), StringComparison.Ordinal);

        // The bound of the first alone is 1 exactly when Hommel's procedure rejects it.
        string first = top.Text(0, "endpoint");
        Assert.Equal(results.Text(first, "paired-t", "rejected_hommel") == "true" ? "1" : "0", top.Text(0, "true_discoveries"));
        ResultsTable families = ResultsTable.Read(folder.At("results/families.csv"));
        Assert.Equal(["first", "second"], [families.Text(0, "family"), families.Text(1, "family")]);
        double[] p = [.. ((string[])["crp", "il6"]).Select(endpoint => results.Number(endpoint, "paired-t", "p_value")).Order()];
        Assert.Equal(Math.Min(2 * p[0], p[1]), double.Parse(families.Text(0, "simes_p"), CultureInfo.InvariantCulture), 1e-15);
        using JsonDocument manifest = JsonDocument.Parse(folder.Read("results/run.json"));
        Assert.InRange(manifest.RootElement.GetProperty("hypotheses")[0].GetProperty("true_null_share").GetDouble(), 0, 1);
    }

    private static ResultsTable Marginal(StudyFolder folder, double confidence, string output)
    {
        string study = folder.Read("study.yaml");
        int intervals = study.IndexOf(", intervals:", StringComparison.Ordinal);
        folder.Write($"{output}.yaml", string.Concat(study.AsSpan(0, intervals), string.Create(CultureInfo.InvariantCulture, $", confidence: {confidence}"), study.AsSpan(study.IndexOf('}', intervals))));
        Assert.Equal(0, folder.Run("analyze", $"{output}.yaml", "--out", output).ExitCode);
        return folder.Results(output);
    }
}
