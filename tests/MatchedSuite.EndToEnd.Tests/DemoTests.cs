using System.Globalization;
using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>The invented demo study: the program finds what was planted, and little else.</summary>
public class DemoTests
{
    [Fact]
    public void The_demo_finds_most_of_what_was_planted_and_hardly_anything_else()
    {
        using var folder = new StudyFolder();
        Finished run = folder.Run("demo", "--out", "demo");
        Assert.True(run.ExitCode == 0, run.Error);
        Assert.Contains("protein", run.Output, StringComparison.Ordinal);
        Assert.Contains("demo/results", run.Error, StringComparison.Ordinal);

        Dictionary<string, double> truth = File.ReadLines(folder.At("demo/truth.csv")).Skip(1).Select(line => line.Split(','))
            .ToDictionary(cells => cells[0], cells => double.Parse(cells[1], CultureInfo.InvariantCulture));
        Assert.Equal(210, truth.Count);
        ResultsTable results = folder.Results("demo/results");
        string[] found = [.. Enumerable.Range(0, results.Rows)
            .Where(row => results.Text(row, "primary") == "true" && results.Text(row, "stratum").Length == 0 && results.Text(row, "rejected_bh") == "true")
            .Select(row => results.Text(row, "endpoint"))];
        int planted = truth.Count(of => of.Value != 0);
        int trulyFound = found.Count(endpoint => truth[endpoint] != 0);
        Assert.InRange(trulyFound, (int)(0.7 * planted), planted);
        Assert.InRange(found.Length - trulyFound, 0, 2);
    }

    [Fact]
    public void The_demo_never_writes_over_a_study_of_somebody_else()
    {
        using StudyFolder folder = StudyFolder.Small();
        string study = folder.Read("study.yaml");
        Finished run = folder.Run("demo", "--out", ".");
        Assert.Equal(2, run.ExitCode);
        Assert.Equal(study, folder.Read("study.yaml"));
    }

    [Fact]
    public void The_demo_study_is_the_same_every_time()
    {
        using var folder = new StudyFolder();
        Assert.Equal(0, folder.Run("demo", "--out", "one", "--quiet").ExitCode);
        Assert.Equal(0, folder.Run("demo", "--out", "two", "--quiet").ExitCode);
        foreach (string file in new[] { "samples.csv", "panel.csv", "markers.csv", "truth.csv", "study.yaml", "results/results.parquet" })
            Assert.Equal(File.ReadAllBytes(folder.At($"one/{file}")), File.ReadAllBytes(folder.At($"two/{file}")));
    }
}
