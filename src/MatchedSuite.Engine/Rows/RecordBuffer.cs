namespace MatchedSuite.Engine.Rows;

/// <summary>Records of one block while a worker fills it; reused from block to block.</summary>
public sealed class RecordBuffer<T>
    where T : unmanaged
{
    private T[] _records = new T[1024];

    /// <summary>Number of records.</summary>
    public int Count { get; private set; }

    /// <summary>The records.</summary>
    public Span<T> Records => _records.AsSpan(0, Count);

    /// <summary>Empties the buffer.</summary>
    public void Clear() => Count = 0;

    /// <summary>Adds a record and hands it out to be filled; every field is zero.</summary>
    public ref T Add()
    {
        if (Count == _records.Length)
            Array.Resize(ref _records, 2 * _records.Length);
        ref T record = ref _records[Count++];
        record = default;
        return ref record;
    }
}
