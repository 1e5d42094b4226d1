using System.Globalization;
using System.Text;
using System.Text.Json;
using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>Adjustments asked for in the study file, through the built executable.</summary>
public class AdjustmentTests
{
    private const string OverPValues =
        "bonferroni, sidak, holm, holm-sidak, hochberg, hommel, bh, by, two-stage-bh, storey-q, weighted-bh, fixed-sequence, gatekeeper-holm";

    [Fact]
    public void Every_adjustment_gives_a_column_of_p_values_and_one_of_rejections()
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Change("study.yaml", "adjust: [bonferroni, holm, bh]", $"adjust: [{OverPValues}, max-t, min-p]");
        Finished run = folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        ResultsTable results = folder.Results();
        foreach (string name in $"{OverPValues}, max-t, min-p".Split(", ").Select(name => name.Replace('-', '_')))
        {
            foreach (string endpoint in (string[])["crp", "il6", "tnf", "alb"])
            {
                double adjusted = results.Number(endpoint, "paired-t", $"p_{name}");
                Assert.InRange(adjusted, double.Epsilon, 1);
                Assert.Equal(adjusted <= 0.05 ? "true" : "false", results.Text(endpoint, "paired-t", $"rejected_{name}"));
                Assert.Equal(name is "max_t" or "min_p", results.Text(endpoint, "signed-rank", $"p_{name}").Length == 0);
            }
        }
    }

    [Fact]
    public void Step_down_max_t_and_min_p_of_eight_pairs_and_five_endpoints_agree_with_enumeration()
    {
        using var folder = new StudyFolder();
        var samples = new StringBuilder("sample,pair,role,e1,e2,e3,e4,e5\n");
        foreach (string line in File.ReadLines(ReferenceValues.File("westfall_young_8x5.csv")).Skip(1))
        {
            int comma = line.IndexOf(',');
            samples.Append(CultureInfo.InvariantCulture, $"s{line[..comma]}i,{line[..comma]},index{line[comma..]}\ns{line[..comma]}r,{line[..comma]},reference,0,0,0,0,0\n");
        }

        folder.Write("samples.csv", samples.ToString());
        folder.Write("study.yaml",
            """
            schema: 1
            study: {name: eight pairs}
            data: {samples: samples.csv, sample: sample}
            design: {kind: pairs, set: pair, role: {column: role, index: index, reference: reference}}
            analysis: {continuous: [paired-t], adjust: [max-t, min-p]}
            output: {folder: results}
            """);
        Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
        for (int endpoint = 1; endpoint <= 5; endpoint++)
        {
            double maxT = ReferenceValues.Of("westfall_young_8x5", "westfall_young.abs_t", $"step_down_maxT.e{endpoint}");
            double minP = ReferenceValues.Of("westfall_young_8x5", "westfall_young.abs_t", $"step_down_minP.e{endpoint}");
            Assert.Equal(maxT, folder.Results().Number($"e{endpoint}", "paired-t", "p_max_t"), 1e-12);
            Assert.Equal(minP, folder.Results().Number($"e{endpoint}", "paired-t", "p_min_p"), 1e-12);
        }

        JsonElement group = Manifest(folder).GetProperty("hypotheses")[0].GetProperty("resampling").GetProperty("max-t");
        Assert.Equal((255, true), (group.GetProperty("flips").GetInt32(), group.GetProperty("all_flips").GetBoolean()));
        Assert.True(Manifest(folder).GetProperty("execution").GetProperty("steps_milliseconds").TryGetProperty("resampling", out _));
    }

    [Fact]
    public void Threads_and_memory_change_no_byte_of_max_t_and_min_p_though_the_differences_go_to_disk()
    {
        // 22,000 endpoints of 100 pairs are 17.6 MB of differences: more than a quarter of 64 MiB.
        using var folder = new StudyFolder();
        WriteMany(folder, endpoints: 22_000, pairs: 100);
        Assert.Equal(0, folder.Run("analyze", "study.yaml", "--quiet", "--threads", "1", "--memory", "1GiB", "--out", "one").ExitCode);
        foreach (string[] way in (string[][])[["--threads", "2", "--memory", "64MiB"], ["--threads", "1", "--memory", "64MiB"], ["--threads", "3"]])
        {
            Assert.Equal(0, folder.Run(["analyze", "study.yaml", "--quiet", "--out", "two", .. way]).ExitCode);
            foreach (string file in (string[])["results.parquet", "results.csv", "summary.csv", "discoveries.csv"])
                Assert.True(File.ReadAllBytes(folder.At($"one/{file}")).SequenceEqual(File.ReadAllBytes(folder.At($"two/{file}"))), $"{file} with {string.Join(' ', way)}");
            Assert.Empty(Directory.EnumerateFiles(folder.Path, "*.scratch", SearchOption.AllDirectories));
        }
    }

    [Fact]
    public void Within_a_stratum_max_t_is_that_of_a_study_of_the_stratum_alone()
    {
        using var folder = new StudyFolder();
        WriteMany(folder, endpoints: 40, pairs: 60);
        string[] samples = File.ReadAllLines(folder.At("samples.csv"));
        string Zone(string line) => int.Parse(line.Split(',')[1], CultureInfo.InvariantCulture) % 3 == 0 ? "north" : "south";
        folder.Write("samples.csv", string.Concat(samples.Select((line, row) => row == 0 ? line + ",zone\n" : $"{line},{Zone(line)}\n")));
        folder.Change("study.yaml", "reference: r}}", "reference: r}, stratum: zone}");
        folder.Change("study.yaml", "[paired-t]", "[signed-rank, paired-t]");
        Assert.Equal(0, folder.Run("analyze", "study.yaml", "--quiet", "--out", "both").ExitCode);

        folder.Write("samples.csv", string.Concat(samples.Select((line, row) =>
            row == 0 || Zone(line) == "north" ? line + "\n" : $"{line.Split(',')[0]},,{line.Split(',')[2]}\n")));
        folder.Change("study.yaml", ", stratum: zone", "");
        Finished run = folder.Run("analyze", "study.yaml", "--quiet", "--out", "north");
        Assert.True(run.ExitCode == 0, run.Error);
        ResultsTable both = folder.Results("both");
        ResultsTable north = folder.Results("north");
        int[] rows = [.. Enumerable.Range(0, both.Rows).Where(row => both.Text(row, "stratum") == "north" && both.Text(row, "primary") == "true")];
        Assert.Equal(40, rows.Length);
        foreach (int row in rows)
        {
            Assert.Equal(north.Text(both.Text(row, "endpoint"), "signed-rank", "p_max_t"), both.Text(row, "p_max_t"));
            Assert.Equal(north.Text(both.Text(row, "endpoint"), "signed-rank", "p_min_p"), both.Text(row, "p_min_p"));
        }
    }

    [Fact]
    public void Over_one_endpoint_with_all_flips_listed_max_t_and_min_p_are_the_exact_signed_rank_test()
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Change("study.yaml", "analysis: {continuous: [paired-t, signed-rank], adjust: [bonferroni, holm, bh]}",
            "endpoints: {include: [crp]}\nanalysis: {continuous: [signed-rank], adjust: [max-t, min-p]}");
        foreach (string sides in (string[])["two", "greater", "less"])
        {
            folder.Change("study.yaml", "analysis: {", $"analysis: {{sides: {sides}, ");
            Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
            ResultsTable results = folder.Results();
            Assert.Equal(results.Number("crp", "signed-rank", "p_value"), results.Number("crp", "signed-rank", "p_max_t"), 1e-14);
            Assert.Equal(results.Number("crp", "signed-rank", "p_value"), results.Number("crp", "signed-rank", "p_min_p"), 1e-14);
            folder.Change("study.yaml", $"sides: {sides}, ", "");
        }
    }

    [Fact]
    public void Another_seed_draws_other_flips()
    {
        using var folder = new StudyFolder();
        WriteMany(folder, endpoints: 20, pairs: 30);
        Assert.Equal(0, folder.Run("analyze", "study.yaml", "--quiet", "--out", "one").ExitCode);
        Assert.Equal(0, folder.Run("analyze", "study.yaml", "--quiet", "--out", "two", "--seed", "99").ExitCode);
        Assert.NotEqual(folder.Read("one/results.csv"), folder.Read("two/results.csv"));
    }

    [Theory]
    [InlineData("continuous: [paired-t, signed-rank], adjust: [bonferroni, holm, bh]", "continuous: [sign], adjust: [max-t]", "key 'analysis.adjust': 'max-t' flips whole sets", "'sign', the primary method of continuous endpoints", "'paired-t', 'signed-rank'")]
    [InlineData("adjust: [bonferroni, holm, bh]", "adjust: [gatekeeper-holm], family: by-family", "key 'analysis.family': 'gatekeeper-holm' goes from family to family", "Set analysis.family to 'all'")]
    [InlineData("adjust: [bonferroni, holm, bh]", "adjust: [by], family: by-family-then-all", "key 'analysis.family': 'by' is not worked out", "'bh' alone")]
    [InlineData("adjust: [bonferroni, holm, bh]", "adjust: [holm], intervals: [fcr]", "key 'analysis.intervals'", "Add bh to analysis.adjust")]
    [InlineData("adjust: [bonferroni, holm, bh]", "adjust: [bh], intervals: [fcr], family: by-family-then-all", "key 'analysis.intervals'", "no guarantee")]
    [InlineData("adjust: [bonferroni, holm, bh]", "adjust: [e-bh]", "'e-bh' is not available in this version")]
    [InlineData("adjust: [bonferroni, holm, bh]", "adjust: [bh], intervals: [profile]", "'profile' is not available in this version", "'fcr', 'simultaneous'")]
    public void What_does_not_go_together_is_refused_before_a_value_is_read(string passage, string replacement, params string[] pieces)
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Change("study.yaml", passage, replacement);
        folder.Change("panel.csv", "il6,5,4.1", "il6,n.d.,4.1");
        foreach (string command in (string[])["check", "analyze"])
        {
            Finished run = folder.Run(command, "study.yaml");
            Assert.Equal(2, run.ExitCode);
            Assert.All(pieces, piece => Assert.Contains(piece, run.Error, StringComparison.Ordinal));
            Assert.False(Directory.Exists(folder.At("results")));
        }
    }

    [Fact]
    public void The_dictionary_gives_order_families_and_weights()
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Write("markers.csv", "endpoint,family,weight\nalb,second,1\ncrp,first,4\nil6,first,1\ntnf,second,2\n");
        folder.Change("study.yaml", "analysis:", "endpoints: {dictionary: markers.csv}\nanalysis:");
        folder.Change("study.yaml", "[bonferroni, holm, bh]", "[holm, fixed-sequence, gatekeeper-holm, weighted-bh]");
        Finished run = folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        ResultsTable results = folder.Results();
        double P(string endpoint) => results.Number(endpoint, "paired-t", "p_value");
        double Column(string endpoint, string name) => results.Number(endpoint, "paired-t", $"p_{name}");
        double inOrder = 0;
        foreach (string endpoint in (string[])["alb", "crp", "il6", "tnf"])
        {
            inOrder = Math.Max(inOrder, P(endpoint));
            Assert.Equal(inOrder, Column(endpoint, "fixed_sequence"));
        }

        // The family of the dictionary's first row is tested first, so crp waits for alb and tnf; the least p/w is that of crp.
        double gate = Math.Max(2 * Math.Min(P("alb"), P("tnf")), Math.Max(P("alb"), P("tnf")));
        Assert.Equal(Math.Max(Math.Min(1, gate), 2 * P("crp")), Column("crp", "gatekeeper_holm"), 1e-15);
        Assert.Equal(P("crp") * 8 / 4, Column("crp", "holm"), 1e-15);
        Assert.Equal(P("crp") * 2 / 4 * 4, Column("crp", "weighted_bh"), 1e-15);
    }

    [Fact]
    public void Endpoints_that_the_design_cannot_find_at_the_first_step_are_flagged()
    {
        // Eight pairs give signed-rank at least 2/2^8: above 0.05/7, so out of reach of holm over seven endpoints, not over four.
        using StudyFolder folder = StudyFolder.Small();
        folder.Change("study.yaml", "continuous: [paired-t, signed-rank], adjust: [bonferroni, holm, bh]", "continuous: [signed-rank], adjust: [bh, holm]");
        Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
        Assert.DoesNotContain("out-of-reach", folder.Results().Text("crp", "signed-rank", "flags"), StringComparison.Ordinal);
        string panel = folder.Read("panel.csv");
        string crp = panel.Split('\n')[1]["crp".Length..];
        folder.Write("panel.csv", panel + $"more1{crp}\nmore2{crp}\nmore3{crp}\n");
        Assert.Equal(0, folder.Run("analyze", "study.yaml").ExitCode);
        Assert.Contains("out-of-reach", folder.Results().Text("crp", "signed-rank", "flags"), StringComparison.Ordinal);
        Assert.Contains("out-of-reach", folder.Read("results/summary.md"), StringComparison.Ordinal);
    }

    private static void WriteMany(StudyFolder folder, int endpoints, int pairs)
    {
        var samples = new StringBuilder("sample,pair,role\n");
        var panel = new StringBuilder("marker");
        for (int pair = 0; pair < pairs; pair++)
        {
            samples.Append(CultureInfo.InvariantCulture, $"s{pair}i,{pair},i\ns{pair}r,{pair},r\n");
            panel.Append(CultureInfo.InvariantCulture, $",s{pair}i,s{pair}r");
        }

        uint state = 12345;
        for (int endpoint = 0; endpoint < endpoints; endpoint++)
        {
            panel.Append(CultureInfo.InvariantCulture, $"\ne{endpoint}");
            for (int sample = 0; sample < 2 * pairs; sample++)
            {
                state = (state * 1664525) + 1013904223;
                panel.Append(',').Append(state % 97 == 0 ? "NA" : ((state >> 16) % 1000).ToString(CultureInfo.InvariantCulture));
            }
        }

        folder.Write("samples.csv", samples.ToString());
        folder.Write("panel.csv", panel.Append('\n').ToString());
        folder.Write("study.yaml",
            """
            schema: 1
            study: {name: many}
            data: {samples: samples.csv, sample: sample, values: panel.csv, layout: endpoint-rows}
            design: {kind: pairs, set: pair, role: {column: role, index: i, reference: r}}
            analysis: {continuous: [paired-t], adjust: [max-t, min-p], resamples: 199}
            output: {folder: results}
            """);
    }

    private static JsonElement Manifest(StudyFolder folder) => JsonDocument.Parse(folder.Read("results/run.json")).RootElement;
}
