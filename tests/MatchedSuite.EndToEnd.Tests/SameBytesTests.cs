using System.Text.Json;
using System.Text.Json.Nodes;
using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>The same inputs, study file, seed and version give the same bytes, however the work is divided.</summary>
public class SameBytesTests
{
    private static readonly string[] Written = ["results.parquet", "results.csv", "details.parquet", "summary.csv", "summary.md", "discoveries.csv", "families.csv", "audit/dispositions.parquet", "audit/matching.md", "audit/untested.csv"];

    [Theory]
    [InlineData("pairs")]
    [InlineData("sets")]
    public void Threads_and_block_sizes_change_no_byte(string design)
    {
        using var folder = new StudyFolder();
        Assert.Equal(0, folder.Run("demo", "--design", design, "--out", "demo", "--quiet").ExitCode);
        string[][] ways = [["--threads", "1"], ["--threads", "2"], ["--threads", "7"], ["--threads", "2", "--memory", "64MiB"]];
        foreach (string[] way in ways)
        {
            Assert.Equal(0, folder.Run(["analyze", "demo/study.yaml", "--quiet", "--out", "again", .. way]).ExitCode);
            foreach (string file in Written)
                Assert.True(File.ReadAllBytes(folder.At($"demo/results/{file}")).SequenceEqual(File.ReadAllBytes(folder.At($"again/{file}"))), $"{file} with {string.Join(' ', way)}");
        }
    }

    [Theory]
    [InlineData("pairs", null)]
    [InlineData("sets", "EnableAVX512")]
    [InlineData("visits", "EnableAVX2")]
    [InlineData("pairs", "EnableHWIntrinsic")]
    public void Machine_code_and_the_runtime_with_any_vector_width_write_the_same_bytes(string design, string? switchedOff)
    {
        using var folder = new StudyFolder();
        Assert.Equal(0, folder.Run("demo", "--design", design, "--out", "demo", "--quiet").ExitCode);
        Finished run = MatchedProgram.RunOnRuntime(folder.Path, switchedOff, "analyze", "demo/study.yaml", "--quiet", "--out", "again");
        Assert.True(run.ExitCode == 0, run.Error);
        foreach (string file in Written)
            Assert.True(File.ReadAllBytes(folder.At($"demo/results/{file}")).SequenceEqual(File.ReadAllBytes(folder.At($"again/{file}"))), file);
    }

    [Theory]
    [InlineData("EnableAVX512")]
    [InlineData("EnableHWIntrinsic")]
    public void Common_sign_flips_count_the_same_with_any_vector_width(string switchedOff)
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Change("study.yaml", "adjust: [bonferroni, holm, bh]", "resamples: 99, adjust: [max-t, min-p]");
        Assert.Equal(0, folder.Run("analyze", "study.yaml", "--quiet").ExitCode);
        Finished run = MatchedProgram.RunOnRuntime(folder.Path, switchedOff, "analyze", "study.yaml", "--quiet", "--out", "again");
        Assert.True(run.ExitCode == 0, run.Error);
        Assert.Equal(folder.Read("results/results.csv"), folder.Read("again/results.csv"));
    }

    [Fact]
    public void Manifests_differ_in_their_execution_alone()
    {
        using StudyFolder folder = StudyFolder.Small();
        Assert.Equal(0, folder.Run("analyze", "study.yaml", "--out", "one", "--threads", "1").ExitCode);
        Assert.Equal(0, folder.Run("analyze", "study.yaml", "--out", "two", "--threads", "2").ExitCode);
        Assert.Equal(WithoutExecution(folder.Read("one/run.json")), WithoutExecution(folder.Read("two/run.json")));
    }

    [Fact]
    public void The_manifest_names_every_input_and_output_with_its_hash()
    {
        using StudyFolder folder = StudyFolder.Small();
        Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
        using JsonDocument manifest = JsonDocument.Parse(folder.Read("results/run.json"));
        foreach (JsonElement input in manifest.RootElement.GetProperty("inputs").EnumerateArray())
            Assert.Equal(Sha256(folder.At(input.GetProperty("file").GetString()!)), input.GetProperty("sha256").GetString());
        JsonElement[] outputs = [.. manifest.RootElement.GetProperty("outputs").EnumerateArray()];
        Assert.Equal(9, outputs.Length);
        foreach (JsonElement output in outputs)
            Assert.Equal(Sha256(folder.At($"results/{output.GetProperty("file").GetString()}")), output.GetProperty("sha256").GetString());
    }

    private static string Sha256(string path) => Convert.ToHexStringLower(System.Security.Cryptography.SHA256.HashData(File.ReadAllBytes(path)));

    private static string WithoutExecution(string manifest)
    {
        JsonObject root = JsonNode.Parse(manifest)!.AsObject();
        Assert.True(root.Remove("execution"));
        return root.ToJsonString();
    }
}
