using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Statistics.Multiplicity;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Adjusting;

/// <summary>The confidence at which the interval of every primary row has to be found again, once the discoveries are known.</summary>
internal sealed class IntervalPlan
{
    private readonly HypothesisTable _table;
    private readonly AdjustedColumns _columns;
    private readonly double[] _coverage;
    private readonly double[] _simultaneous;
    private readonly int _selecting;
    private readonly double _rate;
    private readonly int[] _firstRow;

    /// <summary>Lays out the intervals that a study asks for.</summary>
    public IntervalPlan(AnalysisPlan plan, HypothesisTable table, AdjustedColumns columns)
    {
        _table = table;
        _columns = columns;
        AnalysisSection analysis = plan.Study.Analysis;
        Kinds = analysis.IntervalsOverEndpoints;
        _rate = analysis.Fdr;
        _selecting = plan.Adjustments.ToList().FindIndex(adjustment => adjustment.Controls == ErrorRate.FalseDiscovery);
        _coverage = PerGroup(IntervalKind.Fcr, group => group.Rejected[_selecting] is > 0 and { } discoveries
            ? FalseCoverage.Confidence(discoveries, group.Hypotheses, _rate)
            : double.NaN);
        _simultaneous = PerGroup(IntervalKind.Simultaneous, group => SimultaneousLevel.Confidence(group.Hypotheses, analysis.Confidence));
        _firstRow = FirstRows(table.Endpoints);
    }

    /// <summary>The kinds asked for.</summary>
    public IReadOnlyList<IntervalKind> Kinds { get; }

    /// <summary>The rows of an endpoint.</summary>
    public Range Rows(int endpoint) => _firstRow[endpoint].._firstRow[endpoint + 1];

    /// <summary>The confidence of one interval of a row; NaN where the row has none.</summary>
    public double Confidence(IntervalKind kind, int row)
    {
        if (_table.P[row].IsMissing)
            return double.NaN;
        int group = _table.GroupOf(row);
        if (kind == IntervalKind.Simultaneous)
            return _simultaneous[group];
        return _columns.Of(_selecting, row).IsAtMost(_rate) ? _coverage[group] : double.NaN;
    }

    private double[] PerGroup(IntervalKind kind, Func<HypothesisGroup, double> confidence) =>
    [
        .. _table.Groups.Select(group =>
            Kinds.Contains(kind) && group.Method == HypothesisGroup.PrimaryMethods && group.Hypotheses > 0 ? confidence(group) : double.NaN),
    ];

    // Rows come endpoint by endpoint.
    private static int[] FirstRows(int[] endpoints)
    {
        int count = endpoints.Length == 0 ? 0 : endpoints[^1] + 1;
        var first = new int[count + 1];
        for (int row = 0; row < endpoints.Length; row++)
            first[endpoints[row] + 1] = row + 1;
        return first;
    }
}
