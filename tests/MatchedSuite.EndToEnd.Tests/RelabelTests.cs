using System.Globalization;
using System.Text;
using System.Text.Json;
using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>Max-t by relabelings, through the executable, against every labelling written out.</summary>
public class RelabelTests
{
    private const string Arms =
        """
        schema: 1
        study: {name: small arms}
        data: {samples: samples.csv, sample: sample, values: panel.csv, layout: endpoint-rows, endpoint: marker}
        design:
          kind: change-by-arm
          subject: person
          visit: {column: visit, order: [before, after], reference: before}
          arm: {column: arm, index: new, reference: old}
        analysis: {continuous: [change-welch, paired-t], adjust: [holm, max-t]}
        output: {folder: results}
        """;

    [Fact]
    public void Sets_of_all_shapes_have_the_exact_p_of_every_labelling_and_the_same_bytes_for_any_threads_and_memory()
    {
        using StudyFolder folder = SmallSets.Folder();
        string[] names = SmallSets.Panel.Split('\n')[0].Split(',');
        string[] rows = [.. SmallSets.Panel.Split('\n').Skip(1).Take(3).Select(row =>
            string.Join(',', row.Split(',').Select((cell, i) => row.StartsWith("crp", StringComparison.Ordinal) && names[i] is "s1b" or "s7a" ? "NA" : cell)))];
        folder.Write("panel.csv", SmallSets.Panel.Split('\n')[0] + "\n" + string.Join('\n', rows) + "\n");
        folder.Change("study.yaml", "  subject: person\n", "  subject: person\n  stratum: town\n");
        folder.Change("study.yaml", "adjust: [bonferroni, holm, bh]", "adjust: [holm, max-t], resamples: 331775");
        Finished run = folder.Run("analyze", "study.yaml", "--threads", "1");
        Assert.True(run.ExitCode == 0, run.Error);
        ResultsTable results = folder.Results();
        double[][] values = [.. rows.Select(row => row.Split(',').Skip(1).Select(Number).ToArray())];
        string[] members = names[1..];
        bool[] isCase = [.. members.Select(member => member.EndsWith('a'))];
        int[][] sets = [.. Enumerable.Range(0, members.Length).GroupBy(i => members[i][1..^1]).Select(set => set.ToArray())];
        foreach (var (stratum, blocks, count) in new[] { ("", sets, 331776), ("east", sets[..6], 576), ("west", sets[6..], 576) })
        {
            var all = new WrittenOutLabellings(values, blocks, isCase);
            double[] expected = all.StepDown();
            Assert.Equal(count, all.Count);
            for (int i = 0; i < 3; i++)
                Assert.Equal(expected[i], results.Number(results.Row(rows[i].Split(',')[0], "index-reference", stratum, "conditional-logistic"), "p_max_t"), 1e-12);
        }

        Assert.Equal("", results.Text(results.Row("crp", "index-reference", "", "aligned-rank"), "p_max_t"));
        JsonElement resampling = JsonDocument.Parse(folder.Read("results/run.json")).RootElement.GetProperty("hypotheses")[0].GetProperty("resampling").GetProperty("max-t");
        Assert.Equal(331775, resampling.GetProperty("flips").GetInt32());
        Assert.True(resampling.GetProperty("all_flips").GetBoolean());
        HasTheSameBytes(folder);
    }

    [Fact]
    public void Sets_whose_labellings_are_drawn_have_the_same_bytes_for_any_threads_and_memory()
    {
        using StudyFolder folder = SmallSets.Folder();
        folder.Change("study.yaml", "adjust: [bonferroni, holm, bh]", "adjust: [holm, max-t], resamples: 4999");
        Assert.Equal(0, folder.Run("analyze", "study.yaml", "--threads", "1").ExitCode);
        JsonElement resampling = JsonDocument.Parse(folder.Read("results/run.json")).RootElement.GetProperty("hypotheses")[0].GetProperty("resampling").GetProperty("max-t");
        Assert.False(resampling.GetProperty("all_flips").GetBoolean());
        HasTheSameBytes(folder);
    }

    [Fact]
    public void Values_that_do_not_fit_into_memory_change_no_byte()
    {
        // 24,000 endpoints of 96 members are 18 MB, more than a quarter of the smallest memory.
        const int Members = 96;
        using var folder = new StudyFolder();
        folder.Write("study.yaml", SmallSets.Study.Replace("  subject: person\n", "", StringComparison.Ordinal)
            .Replace("[conditional-logistic, within-set-linear, aligned-rank, set-relabel], adjust: [bonferroni, holm, bh]", "[within-set-linear], adjust: [max-t], resamples: 99", StringComparison.Ordinal));
        folder.Write("samples.csv", "sample,risk_set,status\n" + string.Concat(Enumerable.Range(0, Members).Select(i => $"s{i},r{i / 4},{(i % 4 == 0 ? "case" : "control")}\n")));
        var panel = new StringBuilder("marker," + string.Join(',', Enumerable.Range(0, Members).Select(i => $"s{i}")) + "\n");
        uint state = 12345;
        for (int endpoint = 0; endpoint < 24_000; endpoint++)
        {
            panel.Append(CultureInfo.InvariantCulture, $"e{endpoint}");
            for (int member = 0; member < Members; member++)
            {
                state = (state * 1664525) + 1013904223;
                panel.Append(',').Append(state % 97 == 0 ? "NA" : ((state >> 16) % 1000).ToString(CultureInfo.InvariantCulture));
            }

            panel.Append('\n');
        }

        folder.Write("panel.csv", panel.ToString());
        Finished run = folder.Run("analyze", "study.yaml", "--threads", "2");
        Assert.True(run.ExitCode == 0, run.Error);
        Assert.NotEqual("", folder.Results().Text("e23999", "within-set-linear", "p_max_t"));
        HasTheSameBytes(folder);
    }

    [Theory]
    [InlineData(1, 3, false)] // three sets of 1:2: one labelling of 27 may reach alone
    [InlineData(0, 4, true)] // four sets of 1:1: two of 16 always reach together
    public void Endpoints_that_the_labellings_cannot_find_are_flagged(int shape, int sets, bool outOfReach)
    {
        using StudyFolder folder = SmallSets.Folder();
        string[] used = [.. Enumerable.Range(1, 12).Where(set => set % 3 == shape).Take(sets).Select(set => $",r{set},")];
        folder.Write("samples.csv", string.Join('\n', SmallSets.Samples.Split('\n').Select((line, i) =>
            i == 0 || used.Any(line.Contains) ? line : line.Replace(",case,", ",none,", StringComparison.Ordinal).Replace(",control,", ",none,", StringComparison.Ordinal))));
        folder.Change("study.yaml", "[conditional-logistic, within-set-linear, aligned-rank, set-relabel], adjust: [bonferroni, holm, bh]", "[within-set-linear], adjust: [max-t]");
        Finished run = folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        Assert.Equal(outOfReach, folder.Results().Text("crp", "within-set-linear", "flags").Contains("out-of-reach", StringComparison.Ordinal));
    }

    [Fact]
    public void Changes_of_two_arms_have_the_exact_p_of_every_allocation_and_the_same_bytes_for_any_threads_and_memory()
    {
        using StudyFolder folder = SmallArms(out double[][] changes, out bool[] isNew);
        Finished run = folder.Run("analyze", "study.yaml", "--threads", "1");
        Assert.True(run.ExitCode == 0, run.Error);
        ResultsTable results = folder.Results();
        var all = new WrittenOutLabellings(changes, [[.. Enumerable.Range(0, isNew.Length)]], isNew);
        double[] expected = all.StepDown();
        Assert.Equal(252, all.Count);
        for (int i = 0; i < changes.Length; i++)
            Assert.Equal(expected[i], results.Number(results.Row($"m{i}", "after-before:new-old", "", "change-welch"), "p_max_t"), 1e-12);
        Assert.InRange(expected.Min(), 1.0 / 252, 0.2);
        Assert.Equal("", results.Text(results.Row("m0", "after-before", "new", "paired-t"), "p_max_t"));
        HasTheSameBytes(folder);
    }

    [Fact]
    public void Min_p_between_arms_is_refused()
    {
        using StudyFolder folder = SmallArms(out _, out _);
        folder.Change("study.yaml", "adjust: [holm, max-t]", "adjust: [holm, min-p]");
        Finished run = folder.Run("check", "study.yaml");
        Assert.Equal(2, run.ExitCode);
        Assert.Contains("'min-p' flips signs, and a design of kind 'change-by-arm' exchanges labels instead", run.Error, StringComparison.Ordinal);
    }

    // Ten subjects, five in each arm, three endpoints of which two rise in the new arm; one value is missing.
    private static StudyFolder SmallArms(out double[][] changes, out bool[] isNew)
    {
        const int Subjects = 10;
        bool[] inNew = [.. Enumerable.Range(0, Subjects).Select(subject => subject * 7 % Subjects < 5)];
        var folder = new StudyFolder();
        folder.Write("study.yaml", Arms);
        folder.Write("samples.csv", "sample,person,visit,arm\n" + string.Concat(Enumerable.Range(0, 2 * Subjects).Select(i =>
            $"s{i},p{i / 2},{(i % 2 == 0 ? "before" : "after")},{(inNew[i / 2] ? "new" : "old")}\n")));
        double[][] values = [.. Enumerable.Range(0, 3).Select(endpoint => Enumerable.Range(0, 2 * Subjects).Select(i =>
            (i * i * (37 + endpoint) % 101 / 50.0) + (i % 2 == 1 && inNew[i / 2] ? endpoint * 0.6 : 0)).ToArray())];
        values[1][5] = double.NaN;
        folder.Write("panel.csv", "marker," + string.Join(',', Enumerable.Range(0, 2 * Subjects).Select(i => $"s{i}")) + "\n" + string.Concat(values.Select((row, endpoint) =>
            $"m{endpoint}," + string.Join(',', row.Select(value => double.IsNaN(value) ? "NA" : value.ToString("R", CultureInfo.InvariantCulture))) + "\n")));
        changes = [.. values.Select(row => Enumerable.Range(0, Subjects).Select(subject => row[(2 * subject) + 1] - row[2 * subject]).ToArray())];
        isNew = inNew;
        return folder;
    }

    private static void HasTheSameBytes(StudyFolder folder)
    {
        Finished other = folder.Run("analyze", "study.yaml", "--threads", "3", "--memory", "64MiB", "--out", "other");
        Assert.True(other.ExitCode == 0, other.Error);
        foreach (string file in (string[])["results.parquet", "results.csv", "summary.csv"])
            Assert.True(File.ReadAllBytes(folder.At($"results/{file}")).SequenceEqual(File.ReadAllBytes(folder.At($"other/{file}"))), file);
    }

    private static double Number(string cell) => cell == "NA" ? double.NaN : double.Parse(cell, CultureInfo.InvariantCulture);
}
