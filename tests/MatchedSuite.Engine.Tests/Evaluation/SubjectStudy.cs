using System.Globalization;
using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Engine.Running;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;
using MatchedSuite.Tests;

namespace MatchedSuite.Engine.Tests.Evaluation;

/// <summary>An invented study of 36 subjects with three visits, two arms, two treatments, of whom some miss the last visit.</summary>
internal sealed class SubjectStudy : IDisposable
{
    private const int Subjects = 36;
    private readonly string _folder = Directory.CreateTempSubdirectory("subjects-").FullName;
    private readonly StudyInputs _inputs;

    /// <summary>Opens a study.</summary>
    /// <param name="design">Lines of the section design below the subject.</param>
    /// <param name="analysis">The section analysis in braces.</param>
    /// <param name="endpoints">The section endpoints in braces.</param>
    public SubjectStudy(string design, string analysis, string endpoints = "{}")
    {
        var sheet = new System.Text.StringBuilder("sample,person,visit,arm,drug,town,cold\n");
        for (int subject = 0; subject < Subjects; subject++)
        {
            for (int visit = 0; visit < (subject % 5 == 4 ? 2 : 3); visit++)
            {
                string drug = (subject % 2 == 0) == (visit == 0) ? "A" : "B";
                sheet.Append(CultureInfo.InvariantCulture, $"s{subject}x{visit},p{subject},v{visit},{(subject % 3 == 0 ? "new" : "old")},{drug},{(subject % 4 < 2 ? "east" : "west")},{(subject + (2 * visit)) % 3}\n");
            }
        }

        string[] samples = [.. sheet.ToString().Split('\n').Skip(1).Where(line => line.Length > 0).Select(line => line.Split(',')[0])];
        File.WriteAllText(Path.Combine(_folder, "samples.csv"), sheet.ToString());
        File.WriteAllText(Path.Combine(_folder, "panel.csv"), "marker," + string.Join(',', samples) + "\na," + string.Join(',', samples.Select((_, i) => i)) + "\n");
        string path = Path.Combine(_folder, "study.yaml");
        File.WriteAllText(
            path,
            $"schema: 1\nstudy: {{name: subjects}}\ndata: {{samples: samples.csv, sample: sample, values: panel.csv, layout: endpoint-rows}}\n"
            + $"design:\n  subject: person\n{string.Concat(design.Split('\n').Select(line => $"  {line}\n"))}endpoints: {endpoints}\nanalysis: {analysis}\n");
        _inputs = StudyInputs.Open(StudyReader.Read(path, Available.InThisVersion), new RunOptions { Threads = 1 }, _folder);
        Plan = new AnalysisPlan(_inputs);
    }

    /// <summary>The plan.</summary>
    public AnalysisPlan Plan { get; }

    /// <summary>Values for every used sample: measured, or rounded to signs or levels.</summary>
    public double[] Values(EndpointKind kind)
    {
        double[] measured = [.. Enumerable.Range(0, Plan.Arrangement.Rows.Length).Select(i => 1 + (i * i * 37 % 101 / 25.0))];
        return kind switch
        {
            EndpointKind.Continuous => measured,
            EndpointKind.Binary => [.. measured.Select(value => Math.Floor(value) % 2)],
            _ => [.. measured.Select(Math.Floor)],
        };
    }

    /// <summary>The rows of one endpoint: contrast, method, stratum, and a star for primary ones.</summary>
    public string[] Rows(EndpointKind kind) =>
        [.. Evaluated(kind).Rows.Records.ToArray().Select(row =>
            $"{Plan.Contrasts[row.Contrast]} {Plan.MethodNames[row.Method]} {Plan.StratumName(row.Stratum)}{(row.Primary == 1 ? "*" : "")}")];

    /// <summary>What the evaluation of one endpoint puts out.</summary>
    public BlockOutput Evaluated(EndpointKind kind)
    {
        var output = new BlockOutput();
        Plan.NewEvaluator().Evaluate(Values(kind), new EndpointInfo { Name = "a", Kind = kind }, 0, output);
        return output;
    }

    /// <summary>Bytes that a further endpoint costs once the evaluator is warm.</summary>
    public long BytesOfAFurtherEndpoint(EndpointInfo endpoint)
    {
        EndpointEvaluator evaluator = Plan.NewEvaluator();
        double[] measured = Values(endpoint.Kind);
        double[] values = new double[measured.Length];
        var output = new BlockOutput();
        long allocated = Allocated.Least(Once);
        Assert.All(output.Rows.Records.ToArray().Where(row => row.Stratum == ResultRow.AllStrata), row => Assert.True(row.IsTested));
        return allocated;

        void Once()
        {
            output.Clear();
            measured.CopyTo(values, 0);
            evaluator.Evaluate(values, endpoint, 0, output);
        }
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        _inputs.Dispose();
        Directory.Delete(_folder, recursive: true);
    }
}
