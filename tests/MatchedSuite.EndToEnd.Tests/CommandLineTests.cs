using System.Text.Json;
using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>What a user types and what comes back on which stream.</summary>
public class CommandLineTests
{
    [Fact]
    public void Version_prints_one_line()
    {
        using var folder = new StudyFolder();
        Finished run = folder.Run("--version");
        Assert.Equal(0, run.ExitCode);
        Assert.Matches(@"^\d+\.\d+\.\d+\n$", run.Output);
    }

    [Theory]
    [InlineData("--help")]
    [InlineData("analyze", "--help")]
    [InlineData("audit", "--help")]
    [InlineData("check", "--help")]
    [InlineData("adjust", "--help")]
    [InlineData("demo", "--help")]
    public void Help_goes_to_standard_output(params string[] arguments)
    {
        using var folder = new StudyFolder();
        Finished run = folder.Run(arguments);
        Assert.Equal(0, run.ExitCode);
        Assert.Contains("matched", run.Output, StringComparison.Ordinal);
        Assert.Empty(run.Error);
    }

    [Theory]
    [InlineData("analyse-all", "study.yaml")]
    [InlineData("analyze")]
    [InlineData("analyze", "study.yaml", "--thread", "2")]
    [InlineData("analyze", "study.yaml", "--threads", "0")]
    [InlineData("analyze", "study.yaml", "--threads", "1,5")]
    [InlineData("analyze", "study.yaml", "--seed", "x")]
    [InlineData("analyze", "study.yaml", "--memory", "1KiB")]
    [InlineData("adjust", "panel.csv")]
    [InlineData("adjust", "panel.csv", "--p", "s1a", "--level", "1")]
    public void Wrong_usage_gives_exit_code_2_and_no_output(params string[] arguments)
    {
        using StudyFolder folder = StudyFolder.Small();
        Finished run = folder.Run(arguments);
        Assert.Equal(2, run.ExitCode);
        Assert.StartsWith("matched: ", run.Error, StringComparison.Ordinal);
        Assert.Empty(run.Output);
    }

    [Fact]
    public void Redirected_output_is_the_summary_table_and_nothing_else()
    {
        using StudyFolder folder = StudyFolder.Small();
        Finished run = folder.Run("analyze", "study.yaml");
        string[] lines = run.Output.Split('\n', StringSplitOptions.RemoveEmptyEntries);
        Assert.Equal(5, lines.Length);
        Assert.StartsWith("endpoint", lines[0], StringComparison.Ordinal);
        Assert.All(["crp", "il6", "tnf", "alb"], name => Assert.Single(lines, line => line.StartsWith(name, StringComparison.Ordinal)));
        Assert.DoesNotContain('\u001b', run.Output + run.Error);
    }

    [Fact]
    public void On_a_terminal_a_bar_shows_how_far_the_run_is_and_goes_away()
    {
        using StudyFolder folder = StudyFolder.Small();
        string[] lines = SmallStudy.Panel.Split('\n');
        string values = lines[1][lines[1].IndexOf(',', StringComparison.Ordinal)..];
        folder.Write("panel.csv", lines[0] + "\n" + string.Concat(Enumerable.Range(0, 60_000).Select(endpoint => $"m{endpoint}{values}\n")));

        // script(1) of util-linux gives the program a terminal and writes what it shows to a file.
        using var process = System.Diagnostics.Process.Start(new System.Diagnostics.ProcessStartInfo(
            "script", ["-qec", $"{MatchedProgram.Executable} analyze study.yaml", "shown.txt"])
        {
            WorkingDirectory = folder.Path, RedirectStandardInput = true, RedirectStandardOutput = true, Environment = { ["TERM"] = "xterm-256color" },
        })!;
        process.StandardInput.Close();
        process.StandardOutput.ReadToEnd();
        Assert.True(process.WaitForExit(TimeSpan.FromMinutes(1)));
        string shown = folder.Read("shown.txt");
        Assert.True(process.ExitCode == 0, shown);
        Assert.Contains(" endpoints", shown, StringComparison.Ordinal);
        Assert.Contains("%", shown, StringComparison.Ordinal);
        Assert.Contains("results in", shown, StringComparison.Ordinal);
    }

    [Fact]
    public void Counts_and_cautions_are_said_beside_the_table()
    {
        using StudyFolder folder = StudyFolder.Small();
        Finished run = folder.Run("analyze", "study.yaml");
        Assert.Contains("8 sets (16 of 16 samples), 4 endpoints, 4 tested, 0 not", run.Error, StringComparison.Ordinal);
        Assert.Contains("holm finds ", run.Error, StringComparison.Ordinal);
        Assert.Contains("caution: A screen is not a diagnosis", run.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void Quiet_says_nothing_and_still_writes()
    {
        using StudyFolder folder = StudyFolder.Small();
        Finished run = folder.Run("analyze", "study.yaml", "--quiet");
        Assert.Equal((0, "", ""), (run.ExitCode, run.Output, run.Error));
        Assert.True(File.Exists(folder.At("results/run.json")));
    }

    [Fact]
    public void Verbose_shows_the_trace_of_an_error_and_usual_runs_do_not()
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Change("panel.csv", "il6,5,4.1", "il6,5,n.d.");
        Assert.Contains("   at MatchedSuite", folder.Run("analyze", "study.yaml", "--verbose").Error, StringComparison.Ordinal);
        Assert.DoesNotContain("   at ", folder.Run("analyze", "study.yaml").Error, StringComparison.Ordinal);
    }

    [Fact]
    public void The_log_holds_one_JSON_object_a_line()
    {
        using StudyFolder folder = StudyFolder.Small();
        Assert.Equal(0, folder.Run("analyze", "study.yaml", "--log", "run.log").ExitCode);
        folder.Change("panel.csv", "il6,5,4.1", "il6,5,n.d.");
        Assert.Equal(2, folder.Run("analyze", "study.yaml", "--log", "run.log").ExitCode);
        string[] lines = File.ReadAllLines(folder.At("run.log"));
        Assert.All(lines, line => Assert.True(JsonDocument.Parse(line).RootElement.TryGetProperty("message", out _)));
        Assert.Contains(lines, line => JsonDocument.Parse(line).RootElement.GetProperty("level").GetString() == "error");
    }

    [Fact]
    public void Check_tells_what_would_be_run_and_writes_nothing()
    {
        using StudyFolder folder = StudyFolder.Small();
        Finished run = folder.Run("check", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        Assert.All(["paired-t, signed-rank", "holm", "16 samples", "pairs"], text => Assert.Contains(text, run.Output, StringComparison.Ordinal));
        Assert.False(Directory.Exists(folder.At("results")));
    }

    [Fact]
    public void Audit_prints_the_flow_and_writes_only_where_told()
    {
        using StudyFolder folder = StudyFolder.Small();
        Finished run = folder.Run("audit", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        Assert.Contains("16", run.Output, StringComparison.Ordinal);
        Assert.False(Directory.Exists(folder.At("results")));
        Assert.Equal(0, folder.Run("audit", "study.yaml", "--out", "audited").ExitCode);
        Assert.True(File.Exists(folder.At("audited/audit/dispositions.parquet")));
        Assert.False(File.Exists(folder.At("audited/results.parquet")));
    }
}
