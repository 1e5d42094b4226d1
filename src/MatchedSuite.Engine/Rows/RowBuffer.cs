namespace MatchedSuite.Engine.Rows;

/// <summary>Rows of one block while a worker fills it; reused from block to block.</summary>
public sealed class RowBuffer
{
    private ResultRow[] _rows = new ResultRow[1024];

    /// <summary>Number of rows.</summary>
    public int Count { get; private set; }

    /// <summary>The rows.</summary>
    public Span<ResultRow> Rows => _rows.AsSpan(0, Count);

    /// <summary>Empties the buffer.</summary>
    public void Clear() => Count = 0;

    /// <summary>Adds a row and hands it out to be filled; every field is zero.</summary>
    public ref ResultRow Add()
    {
        if (Count == _rows.Length)
            Array.Resize(ref _rows, 2 * _rows.Length);
        ref ResultRow row = ref _rows[Count++];
        row = default;
        return ref row;
    }
}
