using System.Globalization;
using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Running;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;
using MatchedSuite.Tests;

namespace MatchedSuite.Engine.Tests.Evaluation;

/// <summary>One endpoint on matched sets: which rows and numbers come out, in which order, and at no cost of memory.</summary>
public sealed class SetsEvaluatorTests : IDisposable
{
    private const int Sets = 40;
    private readonly string _folder = Directory.CreateTempSubdirectory("sets-").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    [Fact]
    public void Rows_come_method_by_method_with_all_sets_each_stratum_and_their_difference()
    {
        using StudyInputs inputs = Open("  stratum: town\n");
        var plan = new AnalysisPlan(inputs);
        var output = new BlockOutput();
        plan.NewEvaluator().Evaluate(Values(plan), new EndpointInfo { Name = "a" }, 0, output);
        string[] rows = [.. output.Rows.Records.ToArray().Select(row => $"{plan.MethodNames[row.Method]} {plan.StratumName(row.Stratum)} {row.Primary}")];
        string[] expected =
        [
            .. new[] { "conditional-logistic", "within-set-linear", "aligned-rank", "set-relabel" }
                .SelectMany((method, i) => new[] { "", "east", "west", "difference" }.Select(stratum => $"{method} {stratum} {(i == 0 ? 1 : 0)}")),
        ];
        Assert.Equal(expected, rows);
        Assert.All(output.Rows.Records.ToArray(), row => Assert.True(row.IsTested));
        Assert.Equal(Sets, output.Rows.Records[0].Sets);
        Assert.Equal(Sets, output.Rows.Records[1].Sets + output.Rows.Records[2].Sets);
        Assert.Equal(3 * 10, output.Details.Records.ToArray().Count(detail => detail.Method == 0)); // all sets and two strata
    }

    [Fact]
    public void Values_of_all_members_are_kept_for_all_sets_and_each_stratum_where_labels_are_exchanged()
    {
        using StudyInputs inputs = Open("  stratum: town\n", "max-t");
        var plan = new AnalysisPlan(inputs);
        var output = new BlockOutput();
        double[] values = Values(plan);
        plan.NewEvaluator().Evaluate([.. values], new EndpointInfo { Name = "a", Kind = EndpointKind.Ordinal }, 0, output);
        var members = new double[plan.Arrangement.Members!.Count];
        plan.Arrangement.Members.Values.Gather(values, members);
        FlipSection[] sections = [.. plan.Flips!.Sections];
        Assert.Equal(members, output.Differences.Row[..sections[1].Offset].ToArray());
        Assert.Equal([Sets, Sets / 2, Sets / 2], sections.Select(section => section.Blocks!.Count));
        Assert.Equal(members.Length, sections[1].Sets + sections[2].Sets);
        Assert.All(sections, section => Assert.Equal(section.Sets, section.Blocks!.Members));
        Assert.All(sections[0].Blocks!.IndexCounts.ToArray(), cases => Assert.Equal(1, cases));
        Assert.Equal(members.Order(), output.Differences.Row[sections[1].Offset..].ToArray().Order());
    }

    [Theory]
    [InlineData("", "continuous")]
    [InlineData("  covariates: [smoking]\n", "continuous")]
    [InlineData("  stratum: town\n  covariates: [smoking]\n", "continuous")]
    [InlineData("", "ordinal")]
    [InlineData("  stratum: town\n", "binary")]
    public void Nothing_is_allocated_for_a_further_endpoint(string design, string kind)
    {
        using StudyInputs inputs = Open(design);
        var plan = new AnalysisPlan(inputs);
        EndpointEvaluator evaluator = plan.NewEvaluator();
        Assert.True(WrittenName.TryParse(kind, out EndpointKind parsed));
        var endpoint = new EndpointInfo { Name = "a", Kind = parsed, DetectionLimit = 1 };
        double[] measured = [.. Values(plan).Select(value => parsed == EndpointKind.Continuous ? value : parsed == EndpointKind.Binary ? Math.Floor(value) % 2 : Math.Floor(value))];
        double[] values = new double[measured.Length];
        var output = new BlockOutput();
        Assert.Equal(0, Allocated.Least(Once));
        Assert.True(output.Rows.Records[0].IsTested);

        void Once()
        {
            output.Clear();
            measured.CopyTo(values, 0);
            evaluator.Evaluate(values, endpoint, 0, output);
        }
    }

    [Fact]
    public void Every_method_for_sets_is_a_known_name_for_the_kinds_it_says()
    {
        foreach (SetMethod method in SetMethodTable.All)
            Assert.All(method.Kinds, kind => Assert.Contains(method.Name, KnownNames.MethodsFor(DesignKind.Sets, kind)));
        foreach (EndpointKind kind in Enum.GetValues<EndpointKind>())
            Assert.Equal(KnownNames.MethodsFor(DesignKind.Sets, kind).Order(), SetMethodTable.NamesFor(kind).Order());
    }

    // Every kind of number that a run can put beside a row is asked for.
    private StudyInputs Open(string design, string adjustments = "holm")
    {
        var sheet = new System.Text.StringBuilder("sample,set,role,town,smoking\n");
        for (int set = 0; set < Sets; set++)
        {
            for (int place = 0; place < 2 + set % 3; place++)
                sheet.Append(CultureInfo.InvariantCulture, $"s{set}x{place},r{set},{(place == 0 ? "case" : "control")},{(set % 2 == 0 ? "east" : "west")},{(set + place) % 3}\n");
        }

        string[] samples = [.. sheet.ToString().Split('\n').Skip(1).Where(line => line.Length > 0).Select(line => line.Split(',')[0])];
        File.WriteAllText(Path.Combine(_folder, "samples.csv"), sheet.ToString());
        File.WriteAllText(Path.Combine(_folder, "panel.csv"), "marker," + string.Join(',', samples) + "\na," + string.Join(',', samples.Select((_, i) => i)) + "\n");
        File.WriteAllText(Path.Combine(_folder, "markers.csv"), "endpoint,detection_limit\na,1\n");
        string path = Path.Combine(_folder, "study.yaml");
        File.WriteAllText(
            path,
            $$"""
            schema: 1
            study: {name: sets}
            data: {samples: samples.csv, sample: sample, values: panel.csv, layout: endpoint-rows}
            design:
              kind: sets
              set: set
              role: {column: role, index: case, reference: control}
            {{design}}
            endpoints: {dictionary: markers.csv, scale: sd}
            analysis: {continuous: [conditional-logistic, within-set-linear, aligned-rank, set-relabel], resamples: 99, intervals: [profile], adjust: [{{adjustments}}]}
            """);
        return StudyInputs.Open(StudyReader.Read(path, Available.InThisVersion), new RunOptions { Threads = 1 }, _folder);
    }

    private static double[] Values(AnalysisPlan plan) => [.. Enumerable.Range(0, plan.Arrangement.Rows.Length).Select(i => 1 + i * i * 37 % 101 / 25.0)];
}
