using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Output;

/// <summary>Writes <c>details.parquet</c>: the numbers beside the results that have no column of their own, one a row.</summary>
internal static class DetailTable
{
    private const int BatchRows = 16_384;
    private static readonly string[] Quantities = [.. WrittenName.All<Quantity>()];

    private static readonly TableColumn[] Schema =
    [
        new("endpoint", ColumnType.Text), new("contrast", ColumnType.Text), new("stratum", ColumnType.Text), new("method", ColumnType.Text),
        new("quantity", ColumnType.Text), new("value", ColumnType.Real),
    ];

    /// <summary>Writes the table where there is anything to write.</summary>
    /// <param name="folder">The folder being filled.</param>
    /// <param name="details">The numbers, in the order of the data.</param>
    /// <param name="plan">Names of contrasts, strata and methods.</param>
    /// <param name="names">Names of the endpoints.</param>
    public static void Write(RunFolder folder, RecordStore<DetailRow> details, AnalysisPlan plan, IReadOnlyList<string> names)
    {
        if (details.Count == 0)
            return;
        using var sink = new ParquetTableSink(folder.PathOf("details.parquet"), Schema);
        var batch = new TableBatch(Schema, Math.Min(details.Count, BatchRows));
        details.Scan((int _, in DetailRow detail) =>
        {
            batch.Text(0)[batch.Rows] = names[detail.Endpoint];
            batch.Text(1)[batch.Rows] = plan.Contrasts[detail.Contrast];
            batch.Text(2)[batch.Rows] = plan.StratumName(detail.Stratum);
            batch.Text(3)[batch.Rows] = detail.Method == DetailRow.NoMethod ? "" : plan.MethodNames[detail.Method];
            batch.Text(4)[batch.Rows] = Quantities[(int)detail.Quantity];
            batch.Reals(5)[batch.Rows] = detail.Value;
            batch.Rows++;
            batch.FlushWhenFull(sink);
        });
        batch.Flush(sink);
        sink.Complete();
    }
}
