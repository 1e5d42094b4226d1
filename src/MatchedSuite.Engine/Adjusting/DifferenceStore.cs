using System.Runtime.InteropServices;
using MatchedSuite.Storage.Values;

namespace MatchedSuite.Engine.Adjusting;

/// <summary>The values that adjustments by sign flips need of every endpoint, in the order of the data: in memory, or on disk where they do not fit.</summary>
/// <remarks>Appended by one thread; once appending is over, any number of threads may read. What is read does not depend on where it lay.</remarks>
public sealed class DifferenceStore : IDisposable
{
    private const int ChunkBytes = 1 << 20;
    private readonly string _folder;
    private readonly long _memory;
    private readonly int _rowsOfChunk;
    private readonly List<double[]> _chunks = [];
    private ScratchFile? _file;

    /// <summary>An empty store.</summary>
    /// <param name="width">Numbers kept of one endpoint, at least 1.</param>
    /// <param name="memory">Bytes that may be held before everything goes to a scratch file.</param>
    /// <param name="folder">Folder of that file.</param>
    public DifferenceStore(int width, long memory, string folder)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(width);
        Width = width;
        _memory = memory;
        _folder = folder;
        _rowsOfChunk = Math.Max(1, ChunkBytes / sizeof(double) / width);
    }

    /// <summary>Numbers kept of one endpoint.</summary>
    public int Width { get; }

    /// <summary>Number of endpoints.</summary>
    public int Count { get; private set; }

    /// <summary>True once the values lie on disk.</summary>
    public bool IsOnDisk => _file is not null;

    /// <summary>Adds whole rows at the end.</summary>
    /// <exception cref="IOException">The scratch file cannot be written.</exception>
    public void Append(ReadOnlySpan<double> rows)
    {
        int count = rows.Length / Width;
        if (_file is null && (Count + (long)count) * Width * sizeof(double) > _memory)
            Spill();
        if (_file is not null)
            _file.Write(OffsetOf(Count), MemoryMarshal.AsBytes(rows));
        else
            Keep(rows);
        Count += count;
    }

    /// <summary>Reads a part of one endpoint's row.</summary>
    public void Read(int endpoint, int offset, Span<double> part)
    {
        if (_file is not null)
            _file.Read(OffsetOf(endpoint) + offset * sizeof(double), MemoryMarshal.AsBytes(part));
        else
            _chunks[endpoint / _rowsOfChunk].AsSpan(endpoint % _rowsOfChunk * Width + offset, part.Length).CopyTo(part);
    }

    /// <inheritdoc/>
    public void Dispose() => _file?.Dispose();

    private long OffsetOf(int endpoint) => (long)endpoint * Width * sizeof(double);

    private void Keep(ReadOnlySpan<double> rows)
    {
        for (int row = Count; !rows.IsEmpty; row++, rows = rows[Width..])
        {
            if (row / _rowsOfChunk == _chunks.Count)
                _chunks.Add(new double[_rowsOfChunk * Width]);
            rows[..Width].CopyTo(_chunks[^1].AsSpan(row % _rowsOfChunk * Width));
        }
    }

    private void Spill()
    {
        _file = new ScratchFile(_folder, 0);
        for (int chunk = 0; chunk < _chunks.Count; chunk++)
        {
            int first = chunk * _rowsOfChunk;
            int rows = Math.Min(_rowsOfChunk, Count - first);
            _file.Write(OffsetOf(first), MemoryMarshal.AsBytes(_chunks[chunk].AsSpan(0, rows * Width)));
        }

        _chunks.Clear();
    }
}
