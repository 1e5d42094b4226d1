using MatchedSuite.Engine.Adjusting;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Engine.Running;
using MatchedSuite.Statistics;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Output;

/// <summary>Writes the tables of a run: all results, the summary sorted by p, the untested endpoints.</summary>
internal sealed class ResultTables
{
    /// <summary>More rows than this are written to Parquet only.</summary>
    public const int MostRowsOfCsv = 100_000;
    private const int BatchRows = 16_384;
    private readonly RowStore _rows;
    private readonly AdjustedColumns _adjusted;
    private readonly ResultColumns _columns;
    private readonly AnalysisPlan _plan;
    private readonly Func<int, EndpointInfo> _endpoint;

    /// <summary>Writers over the adjusted rows of one run.</summary>
    public ResultTables(RowStore rows, AdjustedColumns adjusted, AnalysisPlan plan, Func<int, EndpointInfo> endpoint)
    {
        _rows = rows;
        _adjusted = adjusted;
        _plan = plan;
        _endpoint = endpoint;
        _columns = new ResultColumns(plan, adjusted, endpoint);
    }

    /// <summary>Writes <c>results.parquet</c>.</summary>
    public void WriteParquet(RunFolder folder)
    {
        using var sink = new ParquetTableSink(folder.PathOf("results.parquet"), _columns.Schema);
        WriteAll(sink);
    }

    /// <summary>Writes <c>results.csv</c>, where it is not too long.</summary>
    public void WriteCsv(RunFolder folder)
    {
        if (_rows.Count > MostRowsOfCsv)
            return;
        using var sink = new CsvTableSink(folder.PathOf("results.csv"), _columns.Schema);
        WriteAll(sink);
    }

    /// <summary>Writes <c>summary.csv</c>: the primary row of every endpoint and contrast, smallest p first, untested last.</summary>
    public SummaryOrder WriteSummary(RunFolder folder)
    {
        SummaryOrder order = SummaryOrder.Of(_rows);
        using var sink = new CsvTableSink(folder.PathOf("summary.csv"), _columns.Schema);
        var batch = new TableBatch(_columns.Schema, Math.Clamp(order.Count, 1, BatchRows));
        var row = new ResultRow[1];
        foreach (int position in order.Positions)
        {
            _rows.Read(position, row);
            _columns.Add(position, row[0], batch);
            batch.FlushWhenFull(sink);
        }

        batch.Flush(sink);
        sink.Complete();
        return order;
    }

    /// <summary>The first rows of the summary, as a person reads them.</summary>
    public IReadOnlyList<SummaryRow> Top(SummaryOrder order, int count)
    {
        var row = new ResultRow[1];
        var top = new List<SummaryRow>();
        foreach (int position in order.Positions.Take(count))
        {
            _rows.Read(position, row);
            row[0].Remarks |= _adjusted.RemarksOf(position);
            Probability[] adjusted = [.. Enumerable.Range(0, _plan.Adjustments.Count).Select(adjustment => _adjusted.Of(adjustment, position))];
            top.Add(new SummaryRow(
                _endpoint(row[0].Endpoint), _plan.Contrasts[row[0].Contrast], _plan.MethodNames[row[0].Method], row[0], adjusted,
                [.. adjusted.Select((p, adjustment) => p.IsAtMost(_plan.LevelOf(_plan.Adjustments[adjustment])))]));
        }

        return top;
    }

    /// <summary>Writes <c>audit/untested.csv</c>: every endpoint and contrast whose primary method gave no p-value, with the reason.</summary>
    public void WriteUntested(RunFolder folder)
    {
        IReadOnlyList<TableColumn> schema =
        [
            new("endpoint", ColumnType.Text), new("contrast", ColumnType.Text), new("method", ColumnType.Text),
            new("n_sets", ColumnType.Integer), new("n_missing", ColumnType.Integer), new("reason", ColumnType.Text),
        ];
        using var sink = new CsvTableSink(folder.PathOf("audit/untested.csv"), schema);
        var batch = new TableBatch(schema, BatchRows);
        _rows.Scan((int _, in ResultRow row) =>
        {
            if (row.IsTested || row.Primary == 0 || row.Stratum != ResultRow.AllStrata)
                return;
            batch.Text(0)[batch.Rows] = _endpoint(row.Endpoint).Name;
            batch.Text(1)[batch.Rows] = _plan.Contrasts[row.Contrast];
            batch.Text(2)[batch.Rows] = _plan.MethodNames[row.Method];
            batch.Integers(3)[batch.Rows] = row.Sets;
            batch.Integers(4)[batch.Rows] = row.Missing;
            batch.Text(5)[batch.Rows] = UntestedReason.Of((Outcome)row.Outcome, _plan.Study);
            batch.Rows++;
            batch.FlushWhenFull(sink);
        });
        batch.Flush(sink);
        sink.Complete();
    }

    private void WriteAll<TSink>(TSink sink)
        where TSink : ITableSink
    {
        var batch = new TableBatch(_columns.Schema, Math.Clamp(_rows.Count, 1, BatchRows));
        _rows.Scan((int position, in ResultRow row) =>
        {
            _columns.Add(position, row, batch);
            batch.FlushWhenFull(sink);
        });
        batch.Flush(sink);
        sink.Complete();
    }
}
