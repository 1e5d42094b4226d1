using MatchedSuite.Engine.Adjusting;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Engine.Running;
using MatchedSuite.Statistics;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Tests.Adjusting;

/// <summary>A small planned study whose rows a test writes by hand: endpoints in families, with places and weights.</summary>
internal sealed class PlannedStudy : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("matched-plan-").FullName;
    private readonly StudyInputs _inputs;
    private readonly RowStore _rows;
    private readonly List<EndpointInfo> _endpoints = [];

    /// <summary>A study with the given text in its section <c>analysis</c>.</summary>
    public PlannedStudy(string analysis, bool acrossContrasts = false)
    {
        File.WriteAllText(Path.Combine(_folder, "samples.csv"), "pair,role,e\n1,i,1\n1,r,2\n2,i,4\n2,r,3\n3,i,1\n3,r,1\n");
        File.WriteAllText(Path.Combine(_folder, "study.yaml"),
            $$$"""
            schema: 1
            study: {name: planned}
            data: {samples: samples.csv}
            design: {kind: pairs, set: pair, role: {column: role, index: i, reference: r}}
            analysis: {{{{analysis}}}}
            """);
        StudyDefinition study = StudyReader.Read(Path.Combine(_folder, "study.yaml"), Available.InThisVersion);
        study = study with { Analysis = study.Analysis with { AcrossContrasts = acrossContrasts } };
        _inputs = StudyInputs.Open(study, new RunOptions(), _folder);
        Plan = new AnalysisPlan(_inputs);
        _rows = new RowStore(_folder);
    }

    public AnalysisPlan Plan { get; }

    /// <summary>Adds an endpoint with one primary row a p-value, the first of contrast 0, the second of contrast 1, ….</summary>
    public PlannedStudy Add(string family, int place, double weight, params double[] p)
    {
        for (short contrast = 0; contrast < p.Length; contrast++)
        {
            bool isTested = !double.IsNaN(p[contrast]);
            _rows.Append([new ResultRow
            {
                Endpoint = _endpoints.Count, Contrast = contrast, Stratum = ResultRow.AllStrata, Primary = 1,
                P = isTested ? Probability.Of(p[contrast]) : Probability.Missing, SmallestPossibleP = Probability.Of(1.0 / 64),
            }]);
        }

        _endpoints.Add(new EndpointInfo { Name = $"e{_endpoints.Count}", Family = family, Place = place, Weight = weight });
        return this;
    }

    /// <summary>Adjusts all rows.</summary>
    public AdjustedColumns Adjust()
    {
        var traits = new EndpointTraits(_endpoints.Count, endpoint => _endpoints[endpoint]);
        var adjuster = new RowAdjuster(Plan, HypothesisTable.Of(_rows, Plan, traits), traits);
        adjuster.AdjustByP();
        return adjuster.Columns;
    }

    public void Dispose()
    {
        _rows.Dispose();
        _inputs.Dispose();
        Directory.Delete(_folder, recursive: true);
    }
}
