using MatchedSuite.Engine.Adjusting;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Output;

/// <summary>The columns of the results, in their published order, and how a row fills them.</summary>
/// <remarks>docs/results.md describes every column; the order here is the order there.</remarks>
internal sealed class ResultColumns
{
    private static readonly (IntervalKind Kind, string Name)[] Kinds = [(IntervalKind.Fcr, "fcr"), (IntervalKind.Simultaneous, "sim")];

    private readonly AnalysisPlan _plan;
    private readonly AdjustedColumns _adjusted;
    private readonly Func<int, EndpointInfo> _endpoint;

    /// <summary>The columns of one run.</summary>
    public ResultColumns(AnalysisPlan plan, AdjustedColumns adjusted, Func<int, EndpointInfo> endpoint)
    {
        _plan = plan;
        _adjusted = adjusted;
        _endpoint = endpoint;
        Schema =
        [
            Text("endpoint"), Text("label"), Text("unit"), Text("kind"), Text("family"),
            Text("contrast"), Text("stratum"), Text("method"), Truth("primary"),
            Integer("n_sets"), Integer("n_samples"), Integer("n_missing"),
            Real("estimate"), Real("standard_error"), Real("ci_low"), Real("ci_high"),
            .. Kinds.Where(Asked).SelectMany(kind => (TableColumn[])[Real($"ci_{kind.Name}_low"), Real($"ci_{kind.Name}_high")]),
            Real("ratio"), Real("ratio_low"), Real("ratio_high"), Real("effect_size"),
            Real("statistic"), Real("df"), Real("df2"), Real("p_value"), Real("log10_p"),
            .. plan.Adjustments.Select(adjustment => Real($"p_{adjustment.ColumnName}")),
            .. plan.Adjustments.Select(adjustment => Truth($"rejected_{adjustment.ColumnName}")),
            Text("flags"),
        ];
    }

    /// <summary>Names and types.</summary>
    public IReadOnlyList<TableColumn> Schema { get; }

    /// <summary>Adds one row to a batch that has room.</summary>
    public void Add(int position, in ResultRow row, TableBatch batch)
    {
        var cells = new CellWriter(batch);
        AddIdentity(row, ref cells);
        AddNumbers(position, row, ref cells);
        for (int adjustment = 0; adjustment < _plan.Adjustments.Count; adjustment++)
            cells.Real(_adjusted.Of(adjustment, position).Value);
        for (int adjustment = 0; adjustment < _plan.Adjustments.Count; adjustment++)
            cells.Truth(_adjusted.Of(adjustment, position).IsAtMost(_plan.LevelOf(_plan.Adjustments[adjustment])));
        cells.Text(RemarkCodes.Join(row.Remarks | _adjusted.RemarksOf(position)));
        batch.Rows++;
    }

    private static TableColumn Text(string name) => new(name, ColumnType.Text);

    private static TableColumn Integer(string name) => new(name, ColumnType.Integer);

    private static TableColumn Real(string name) => new(name, ColumnType.Real);

    private static TableColumn Truth(string name) => new(name, ColumnType.Truth);

    private void AddNumbers(int position, in ResultRow row, ref CellWriter cells)
    {
        cells.Integer(row.Sets);
        cells.Integer(row.Samples);
        cells.Integer(row.Missing);
        cells.Real(row.Estimate);
        cells.Real(row.StandardError);
        cells.Real(row.Low);
        cells.Real(row.High);
        foreach (var (kind, _) in Kinds.Where(Asked))
        {
            Interval interval = _adjusted.IntervalOf(kind, position);
            cells.Real(interval.Low);
            cells.Real(interval.High);
        }

        cells.Real(Ratio.Of(row.Estimate, (LogBase)row.LogBase));
        cells.Real(Ratio.Of(row.Low, (LogBase)row.LogBase));
        cells.Real(Ratio.Of(row.High, (LogBase)row.LogBase));
        cells.Real(row.EffectSize);
        cells.Real(row.Statistic);
        cells.Real(row.DegreesOfFreedom);
        cells.Real(row.DenominatorDegreesOfFreedom);
        cells.Real(row.P.Value);
        cells.Real(row.P.Log10);
    }

    private bool Asked((IntervalKind Kind, string Name) interval) => _plan.Study.Analysis.Intervals.Contains(interval.Kind);

    private void AddIdentity(in ResultRow row, ref CellWriter cells)
    {
        EndpointInfo endpoint = _endpoint(row.Endpoint);
        cells.Text(endpoint.Name);
        cells.Text(endpoint.Label);
        cells.Text(endpoint.Unit);
        cells.Text(WrittenName.Of(endpoint.Kind));
        cells.Text(endpoint.Family);
        cells.Text(_plan.Contrasts[row.Contrast]);
        cells.Text(_plan.StratumName(row.Stratum));
        cells.Text(_plan.MethodNames[row.Method]);
        cells.Truth(row.Primary == 1);
    }

    // Fills the batch's next row from left to right.
    private ref struct CellWriter(TableBatch batch)
    {
        private int _column;

        public void Text(string? value) => batch.Text(_column++)[batch.Rows] = value;

        public void Integer(int value) => batch.Integers(_column++)[batch.Rows] = value;

        public void Real(double value) => batch.Reals(_column++)[batch.Rows] = value;

        public void Truth(bool value) => batch.Truths(_column++)[batch.Rows] = value;
    }
}
