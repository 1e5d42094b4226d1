using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using Microsoft.Win32.SafeHandles;

namespace MatchedSuite.Engine.Rows;

/// <summary>The result rows of a run in the order of the data, kept in a scratch file so that memory stays bounded.</summary>
/// <remarks>Appended by one thread; once appending is over, any number of threads may read.</remarks>
public sealed class RowStore : IDisposable
{
    private static readonly int RowBytes = Unsafe.SizeOf<ResultRow>();
    private readonly SafeFileHandle _file;
    private readonly string _path;

    /// <summary>Creates the store's file in <paramref name="folder"/>.</summary>
    public RowStore(string folder)
    {
        _path = Path.Combine(folder, "rows.scratch");
        _file = File.OpenHandle(_path, FileMode.Create, FileAccess.ReadWrite, FileShare.None, FileOptions.DeleteOnClose);
    }

    /// <summary>Number of rows.</summary>
    public int Count { get; private set; }

    /// <summary>Adds rows at the end.</summary>
    public void Append(ReadOnlySpan<ResultRow> rows)
    {
        try
        {
            RandomAccess.Write(_file, MemoryMarshal.AsBytes(rows), (long)Count * RowBytes);
        }
        catch (ArgumentOutOfRangeException error)
        {
            // The framework reports a file that outgrows the system's limit as a wrong argument.
            throw new IOException($"The file '{_path}' would grow beyond what the system allows.", error);
        }

        Count += rows.Length;
    }

    /// <summary>Reads rows from position <paramref name="first"/> on.</summary>
    public void Read(int first, Span<ResultRow> rows)
    {
        Span<byte> bytes = MemoryMarshal.AsBytes(rows);
        long offset = (long)first * RowBytes;
        while (bytes.Length > 0)
        {
            int read = RandomAccess.Read(_file, bytes, offset);
            if (read == 0)
                throw new EndOfStreamException($"{_path} ends before row {first + rows.Length}.");
            bytes = bytes[read..];
            offset += read;
        }
    }

    /// <summary>Hands every row to <paramref name="visit"/>, in order, with its position.</summary>
    public void Scan(RowVisitor visit)
    {
        var buffer = new ResultRow[Math.Min(Count, 4096)];
        for (int first = 0; first < Count; first += buffer.Length)
        {
            Span<ResultRow> rows = buffer.AsSpan(0, Math.Min(buffer.Length, Count - first));
            Read(first, rows);
            for (int i = 0; i < rows.Length; i++)
                visit(first + i, in rows[i]);
        }
    }

    /// <inheritdoc/>
    public void Dispose() => _file.Dispose();
}

/// <summary>Sees one row of a store at its position.</summary>
public delegate void RowVisitor(int position, in ResultRow row);
