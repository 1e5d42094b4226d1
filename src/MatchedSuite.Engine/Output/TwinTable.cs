using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics.Twins;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Output;

/// <summary>Writes <c>twins.csv</c>, where the strata are the two kinds of twins: likeness of each kind and Falconer's description.</summary>
internal sealed class TwinTable
{
    private const int BatchRows = 16_384;
    private const int MonozygoticColumn = 1;
    private const int DizygoticColumn = 4;

    private static readonly TableColumn[] Schema =
    [
        new("endpoint", ColumnType.Text), new("icc_mz", ColumnType.Real), new("icc_mz_low", ColumnType.Real), new("icc_mz_high", ColumnType.Real),
        new("icc_dz", ColumnType.Real), new("icc_dz_low", ColumnType.Real), new("icc_dz_high", ColumnType.Real),
        new("falconer_genes", ColumnType.Real), new("falconer_shared", ColumnType.Real),
    ];

    private readonly CsvTableSink _sink;
    private readonly TableBatch _batch = new(Schema, BatchRows);
    private readonly IReadOnlyList<string> _names;
    private int _endpoint = -1;

    private TwinTable(CsvTableSink sink, IReadOnlyList<string> names)
    {
        _sink = sink;
        _names = names;
    }

    /// <summary>Writes the table from the numbers beside the results.</summary>
    public static void Write(RunFolder folder, RecordStore<DetailRow> details, AnalysisPlan plan, IReadOnlyList<string> names)
    {
        if (plan.Study.Design.Kind != DesignKind.Pairs || !TwinStrata.Are(plan.Arrangement.Strata))
            return;
        using var sink = new CsvTableSink(folder.PathOf("twins.csv"), Schema);
        var table = new TwinTable(sink, names);
        details.Scan((int _, in DetailRow detail) => table.Take(detail, plan.StratumName(detail.Stratum)));
        table.EndRow();
        table._batch.Flush(sink);
        sink.Complete();
    }

    private void Take(in DetailRow detail, string stratum)
    {
        int offset = detail.Quantity switch
        {
            Quantity.IntraclassCorrelation => 0,
            Quantity.IntraclassCorrelationLow => 1,
            Quantity.IntraclassCorrelationHigh => 2,
            _ => -1,
        };
        if (offset < 0)
            return;
        if (detail.Endpoint != _endpoint)
            StartRow(detail.Endpoint);
        int column = stratum == TwinStrata.Monozygotic ? MonozygoticColumn : DizygoticColumn;
        _batch.Reals(column + offset)[_batch.Rows] = detail.Value;
    }

    private void StartRow(int endpoint)
    {
        EndRow();
        _endpoint = endpoint;
        _batch.Text(0)[_batch.Rows] = _names[endpoint];
        for (int column = 1; column < Schema.Length; column++)
            _batch.Reals(column)[_batch.Rows] = double.NaN;
    }

    private void EndRow()
    {
        if (_endpoint < 0)
            return;
        double monozygotic = _batch.Reals(MonozygoticColumn)[_batch.Rows];
        double dizygotic = _batch.Reals(DizygoticColumn)[_batch.Rows];
        _batch.Reals(7)[_batch.Rows] = Falconer.Heritability(monozygotic, dizygotic);
        _batch.Reals(8)[_batch.Rows] = Falconer.SharedEnvironment(monozygotic, dizygotic);
        _batch.Rows++;
        _endpoint = -1;
        _batch.FlushWhenFull(_sink);
    }
}
