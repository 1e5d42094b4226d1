using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using Microsoft.Win32.SafeHandles;

namespace MatchedSuite.Engine.Rows;

/// <summary>Records of one kind in the order of the data, kept in a scratch file so that memory stays bounded.</summary>
/// <remarks>Appended by one thread; once appending is over, any number of threads may read.</remarks>
public class RecordStore<T> : IDisposable
    where T : unmanaged
{
    private static readonly int RecordBytes = Unsafe.SizeOf<T>();
    private const int PageRecords = 4096;
    private readonly SafeFileHandle _file;
    private readonly string _path;

    /// <summary>Creates the store's file; it is gone when the store is disposed.</summary>
    public RecordStore(string path)
    {
        _path = path;
        _file = File.OpenHandle(_path, FileMode.Create, FileAccess.ReadWrite, FileShare.None, FileOptions.DeleteOnClose);
    }

    /// <summary>Number of records.</summary>
    public int Count { get; private set; }

    /// <summary>Adds records at the end.</summary>
    public void Append(ReadOnlySpan<T> records)
    {
        try
        {
            RandomAccess.Write(_file, MemoryMarshal.AsBytes(records), (long)Count * RecordBytes);
        }
        catch (ArgumentOutOfRangeException error)
        {
            // The framework reports a file that outgrows the system's limit as a wrong argument.
            throw new IOException($"The file '{_path}' would grow beyond what the system allows.", error);
        }

        Count += records.Length;
    }

    /// <summary>Puts another record in the place of one that is there.</summary>
    public void Rewrite(int position, in T record) =>
        RandomAccess.Write(_file, MemoryMarshal.AsBytes(new ReadOnlySpan<T>(in record)), (long)position * RecordBytes);

    /// <summary>Reads records from position <paramref name="first"/> on.</summary>
    public void Read(int first, Span<T> records)
    {
        Span<byte> bytes = MemoryMarshal.AsBytes(records);
        long offset = (long)first * RecordBytes;
        while (bytes.Length > 0)
        {
            int read = RandomAccess.Read(_file, bytes, offset);
            if (read == 0)
                throw new EndOfStreamException($"{_path} ends before record {first + records.Length}.");
            bytes = bytes[read..];
            offset += read;
        }
    }

    /// <summary>Hands every record to <paramref name="visit"/>, in order, with its position.</summary>
    public void Scan(RecordVisitor<T> visit)
    {
        var page = new T[Math.Min(Count, PageRecords)];
        for (int first = 0; first < Count; first += page.Length)
        {
            Span<T> records = page.AsSpan(0, Math.Min(page.Length, Count - first));
            Read(first, records);
            for (int i = 0; i < records.Length; i++)
                visit(first + i, in records[i]);
        }
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        _file.Dispose();
        GC.SuppressFinalize(this);
    }
}
