using System.Diagnostics;
using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>A run appears whole or not at all, never over a stranger's files, and never twice at once.</summary>
public class RunFolderTests
{
    [Fact]
    public void A_run_writes_every_promised_file_and_leaves_nothing_beside_it()
    {
        using StudyFolder folder = StudyFolder.Small();
        Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
        string[] files = [.. Directory.EnumerateFiles(folder.At("results"), "*", SearchOption.AllDirectories)
            .Select(path => Path.GetRelativePath(folder.At("results"), path).Replace('\\', '/')).Order(StringComparer.Ordinal)];
        Assert.Equal(
            ["audit/dispositions.parquet", "audit/matching.md", "audit/untested.csv", "discoveries.csv", "families.csv", "results.csv", "results.parquet", "run.json", "summary.csv", "summary.md"],
            files);
        Assert.Equal(["panel.csv", "results", "samples.csv", "study.yaml"], Entries(folder));
    }

    [Fact]
    public void An_earlier_run_is_replaced_whole()
    {
        using StudyFolder folder = StudyFolder.Small();
        Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
        folder.Write("results/of-the-earlier-run.txt", "old");
        Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
        Assert.False(File.Exists(folder.At("results/of-the-earlier-run.txt")));
        Assert.Equal(["panel.csv", "results", "samples.csv", "study.yaml"], Entries(folder));
    }

    [Fact]
    public void An_earlier_run_stays_where_the_study_file_says_refuse()
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Change("study.yaml", "{folder: results}", "{folder: results, overwrite: refuse}");
        Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
        Finished second = folder.Run("analyze", "study.yaml");
        Assert.Equal(2, second.ExitCode);
        Assert.Contains("overwrite", second.Error, StringComparison.Ordinal);
        Assert.True(File.Exists(folder.At("results/run.json")));
    }

    [Fact]
    public void A_folder_with_other_files_is_never_replaced()
    {
        using StudyFolder folder = StudyFolder.Small();
        Directory.CreateDirectory(folder.At("results"));
        folder.Write("results/thesis.txt", "mine");
        Finished run = folder.Run("analyze", "study.yaml");
        Assert.Equal(2, run.ExitCode);
        Assert.Equal("mine", folder.Read("results/thesis.txt"));
    }

    [Fact]
    public void A_folder_with_the_study_inside_is_never_replaced()
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Write("run.json", "{}");
        Finished run = folder.Run("analyze", "study.yaml", "--out", ".");
        Assert.Equal(2, run.ExitCode);
        Assert.Contains("which the run reads", run.Error, StringComparison.Ordinal);
        Assert.True(File.Exists(folder.At("panel.csv")));
    }

    [Fact]
    public void A_refused_study_leaves_the_earlier_run_as_it_was()
    {
        using StudyFolder folder = StudyFolder.Small();
        Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
        string before = folder.Read("results/results.csv");
        folder.Change("panel.csv", "il6,5,4.1", "il6,5,n.d.");
        Assert.Equal(2, folder.Run("analyze", "study.yaml").ExitCode);
        Assert.Equal(before, folder.Read("results/results.csv"));
    }

    [Fact]
    public void A_folder_that_another_run_holds_gives_exit_code_4()
    {
        using StudyFolder folder = StudyFolder.Small();
        using FileStream held = new(folder.At(".results.lock"), FileMode.Create, FileAccess.ReadWrite, FileShare.None);
        Finished run = folder.Run("analyze", "study.yaml");
        Assert.Equal(4, run.ExitCode);
        Assert.Contains("another run", run.Error, StringComparison.Ordinal);
        Assert.False(Directory.Exists(folder.At("results")));
    }

    [Fact]
    public void What_a_killed_run_left_is_cleared_by_the_next()
    {
        using StudyFolder folder = StudyFolder.Small();
        Directory.CreateDirectory(folder.At(".results.partial/audit"));
        folder.Write(".results.partial/audit/half.txt", "half");
        Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
        Assert.Equal(["panel.csv", "results", "samples.csv", "study.yaml"], Entries(folder));
    }

    [Fact]
    public void A_broken_gate_gives_exit_code_3_with_the_audit_and_without_results()
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Change("study.yaml", "output:", "gates: {unmatched-at-most: 5%}\noutput:");
        folder.Change("samples.csv", "s8b,p8,no", "s8b,,no");
        Finished run = folder.Run("analyze", "study.yaml");
        Assert.Equal(3, run.ExitCode);
        Assert.Contains("unmatched-at-most", run.Error, StringComparison.Ordinal);
        Assert.True(File.Exists(folder.At("results/audit/matching.md")));
        Assert.False(File.Exists(folder.At("results/results.parquet")));
        Assert.Equal(3, folder.Run("audit", "study.yaml").ExitCode);
    }

    [Fact]
    public void An_interrupt_gives_exit_code_130_and_leaves_nothing()
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Write("panel.csv", LongPanel(40_000));
        using Process process = MatchedProgram.Start(folder.Path, "analyze", "study.yaml", "--threads", "1");
        SpinWait.SpinUntil(() => Directory.Exists(folder.At(".results.partial")), TimeSpan.FromSeconds(30));
        Signal(process, "INT");
        Assert.True(process.WaitForExit(TimeSpan.FromSeconds(60)));
        Assert.Equal(130, process.ExitCode);
        Assert.Equal(["panel.csv", "samples.csv", "study.yaml"], Entries(folder));
    }

    [Fact]
    public void A_full_disk_gives_one_message_and_leaves_nothing()
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Write("panel.csv", LongPanel(3_000));

        // A limit on file size (128 blocks of 512 bytes) stands in for the full disk: the system refuses to write on.
        string command = $"ulimit -f 128; trap '' XFSZ; exec '{MatchedProgram.Executable}' analyze study.yaml";
        using var process = Process.Start(new ProcessStartInfo("/bin/sh", ["-c", command])
        {
            WorkingDirectory = folder.Path, RedirectStandardError = true, RedirectStandardOutput = true, Environment = { ["DOTNET_EnableWriteXorExecute"] = "0" },
        })!;
        string error = process.StandardError.ReadToEnd();
        Assert.True(process.WaitForExit(TimeSpan.FromSeconds(60)));
        Assert.Equal(1, process.ExitCode);
        string message = Assert.Single(error.Split('\n', StringSplitOptions.RemoveEmptyEntries));
        Assert.Contains("Nothing was written", message, StringComparison.Ordinal);
        Assert.Equal(["panel.csv", "samples.csv", "study.yaml"], Entries(folder));
    }

    private static string[] Entries(StudyFolder folder) =>
        [.. Directory.EnumerateFileSystemEntries(folder.Path).Select(path => Path.GetFileName(path)!).Order(StringComparer.Ordinal)];

    private static string LongPanel(int endpoints)
    {
        string[] lines = SmallStudy.Panel.Split('\n');
        string values = lines[1][lines[1].IndexOf(',', StringComparison.Ordinal)..];
        return lines[0] + "\n" + string.Concat(Enumerable.Range(0, endpoints).Select(endpoint => $"m{endpoint}{values}\n"));
    }

    private static void Signal(Process process, string signal)
    {
        using Process kill = Process.Start("kill", [$"-{signal}", process.Id.ToString(System.Globalization.CultureInfo.InvariantCulture)])!;
        kill.WaitForExit();
    }
}
