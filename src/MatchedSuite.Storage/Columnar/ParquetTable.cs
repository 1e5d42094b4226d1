using MatchedSuite.Storage.Files;
using Parquet;

namespace MatchedSuite.Storage.Columnar;

/// <summary>An open Parquet file. One thread at a time may use it.</summary>
internal sealed class ParquetTable : IDisposable
{
    private const int BufferBytes = 1 << 16;

    private readonly Stream _stream;
    private readonly ParquetReader _reader;

    private ParquetTable(string path, Stream stream, ParquetReader reader)
    {
        Path = path;
        _stream = stream;
        _reader = reader;
        Columns = [.. reader.Schema.Fields.Select(ParquetColumn.Of)];
        Names = [.. Columns.Select(column => column.Name)];
        RowsOfGroup = [.. reader.Metadata!.RowGroups.Select(group => checked((int)group.NumRows))];
        Rows = RowsOfGroup.Sum(rows => (long)rows);
    }

    public string Path { get; }

    public IReadOnlyList<ParquetColumn> Columns { get; }

    public IReadOnlyList<string> Names { get; }

    /// <summary>Rows of each row group.</summary>
    public IReadOnlyList<int> RowsOfGroup { get; }

    public long Rows { get; }

    /// <summary>Opens a file and reads its footer.</summary>
    /// <exception cref="RefusalException">The file cannot be opened, is damaged or no Parquet file, or has a column name twice.</exception>
    public static ParquetTable Open(string path)
    {
        Stream stream = new SynchronousStream(new BufferedStream(InputFile.Open(path), BufferBytes));
        try
        {
            ParquetTable table = Guarded(path, () =>
                new ParquetTable(path, stream, Completed.Of(ParquetReader.CreateAsync(stream, leaveStreamOpen: true))));
            ColumnNames.RequireDistinct(InputFile.ShortName(path), table.Names);
            return table;
        }
        catch
        {
            stream.Dispose();
            throw;
        }
    }

    /// <summary>Refuses a file without a row.</summary>
    public void RequireRows()
    {
        if (Rows == 0)
            throw new RefusalException(InputFile.ShortName(Path), "the file holds columns and no row", "at least one row");
    }

    /// <summary>Runs a read of one row group; whatever the library throws on damaged bytes becomes one refusal.</summary>
    public T Read<T>(int group, Func<ParquetRowGroupReader, T> read) => Guarded(Path, () =>
    {
        using ParquetRowGroupReader rows = _reader.OpenRowGroupReader(group);
        return read(rows);
    });

    public void Dispose()
    {
        Completed.Wait(_reader.DisposeAsync());
        _stream.Dispose();
    }

    // The library checks no checksums; on damaged bytes it throws at least six types, index errors among them.
    private static T Guarded<T>(string path, Func<T> read)
    {
        try
        {
            return read();
        }
        catch (NotSupportedException failure)
        {
            throw new RefusalException(InputFile.ShortName(path), $"the file uses what this version cannot read ({failure.Message})",
                "Parquet of format version 1", "Write it again with format version 1, or as CSV.", failure);
        }
        catch (Exception failure) when (failure is not RefusalException)
        {
            throw new RefusalException(InputFile.ShortName(path), "the file is damaged or not a Parquet file", "a complete Parquet file",
                "Copy or write it again.", failure);
        }
    }
}
