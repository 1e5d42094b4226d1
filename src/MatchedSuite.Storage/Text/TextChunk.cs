using System.Buffers;

namespace MatchedSuite.Storage.Text;

/// <summary>Some whole records of a delimited text file, as bytes. Its array is lent and goes back by <see cref="Release"/>.</summary>
internal sealed class TextChunk(byte[] bytes, int length, long firstLine, long firstRecord, int records, double reached)
{
    private byte[]? _bytes = bytes;

    public ReadOnlySpan<byte> Bytes =>
        (_bytes ?? throw new InvalidOperationException("A block can be loaded once.")).AsSpan(0, length);

    /// <summary>Number, from 1, of the line on which the first record begins.</summary>
    public long FirstLine { get; } = firstLine;

    /// <summary>Number of the first record, from 0; the header is record 0.</summary>
    public long FirstRecord { get; } = firstRecord;

    /// <summary>Number of records.</summary>
    public int Records { get; } = records;

    /// <summary>Share of the file that lies before the end of the chunk.</summary>
    public double Reached { get; } = reached;

    public void Release()
    {
        byte[]? lent = Interlocked.Exchange(ref _bytes, null);
        if (lent is not null) ArrayPool<byte>.Shared.Return(lent);
    }
}
