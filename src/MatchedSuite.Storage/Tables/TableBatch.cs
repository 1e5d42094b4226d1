namespace MatchedSuite.Storage.Tables;

/// <summary>Some rows of a table, column by column, on their way to a sink. Reused from batch to batch.</summary>
public sealed class TableBatch
{
    private readonly Array[] _columns;

    /// <summary>Room for <paramref name="capacity"/> rows of <paramref name="schema"/>.</summary>
    public TableBatch(IReadOnlyList<TableColumn> schema, int capacity)
    {
        Schema = schema;
        Capacity = capacity;
        _columns = [.. schema.Select(column => column.Type switch
        {
            ColumnType.Text => (Array)new string?[capacity],
            ColumnType.Integer => new int[capacity],
            ColumnType.Real => new double[capacity],
            _ => new bool[capacity],
        })];
    }

    /// <summary>The columns.</summary>
    public IReadOnlyList<TableColumn> Schema { get; }

    /// <summary>Largest number of rows.</summary>
    public int Capacity { get; }

    /// <summary>Rows filled so far.</summary>
    public int Rows { get; set; }

    /// <summary>Hands a full batch to a sink and empties it; one with room is left as it is.</summary>
    public void FlushWhenFull(ITableSink sink)
    {
        if (Rows == Capacity)
            Flush(sink);
    }

    /// <summary>Hands the filled rows to a sink, if there are any, and empties the batch.</summary>
    public void Flush(ITableSink sink)
    {
        if (Rows == 0)
            return;
        sink.Write(this);
        Rows = 0;
    }

    /// <summary>A text column's cells.</summary>
    public string?[] Text(int column) => (string?[])_columns[column];

    /// <summary>An integer column's cells.</summary>
    public int[] Integers(int column) => (int[])_columns[column];

    /// <summary>A real column's cells.</summary>
    public double[] Reals(int column) => (double[])_columns[column];

    /// <summary>A truth column's cells.</summary>
    public bool[] Truths(int column) => (bool[])_columns[column];
}
