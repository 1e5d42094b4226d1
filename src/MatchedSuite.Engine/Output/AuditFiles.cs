using MatchedSuite.Engine.Running;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Output;

/// <summary>Writes the audit's table: one row a row of the sample sheet, exactly one disposition each.</summary>
internal static class AuditFiles
{
    private const int BatchRows = 16_384;

    private static readonly TableColumn[] Schema =
    [
        new("row", ColumnType.Integer), new("sample", ColumnType.Text), new("set", ColumnType.Text), new("role", ColumnType.Text),
        new("disposition", ColumnType.Text),
    ];

    /// <summary>Writes <c>audit/dispositions.parquet</c>.</summary>
    public static void Write(RunFolder folder, StudyInputs inputs)
    {
        using var sink = new ParquetTableSink(folder.PathOf("audit/dispositions.parquet"), Schema);
        var batch = new TableBatch(Schema, BatchRows);
        foreach (AuditedRow row in inputs.Audit.AuditTable)
        {
            batch.Integers(0)[batch.Rows] = row.Row;
            batch.Text(1)[batch.Rows] = row.Sample;
            batch.Text(2)[batch.Rows] = row.Set;
            batch.Text(3)[batch.Rows] = row.Role;
            batch.Text(4)[batch.Rows] = WrittenName.Of(row.Disposition);
            batch.Rows++;
            batch.FlushWhenFull(sink);
        }

        batch.Flush(sink);
        sink.Complete();
    }
}
