using System.Text;
using MatchedSuite.Storage.Columnar;
using MatchedSuite.Storage.Files;
using MatchedSuite.Storage.Text;

namespace MatchedSuite.Storage.Tables;

/// <summary>Writes a table once more, its columns in their order and unchanged, with columns added behind them.</summary>
/// <remarks>From Parquet to Parquet every column keeps its type; from text every cell keeps its text, blanks included.</remarks>
public static class TableCopy
{
    private const int ChunkBytes = 1 << 20;
    private const int BatchRows = 4096;

    private static readonly (string Ending, char Delimiter)[] TextFormats = [(".csv", ','), (".tsv", '\t')];

    /// <summary>Refuses a name whose ending tells no format that can be written.</summary>
    /// <exception cref="RefusalException">The ending is not .csv, .tsv or .parquet.</exception>
    public static void RequireFormat(string path)
    {
        if (!TextTable.IsParquet(path) && DelimiterOf(path) is null)
            throw new RefusalException(path, "the ending tells no format", "a name that ends in .csv, .tsv or .parquet", "Give the file one of these endings.");
    }

    /// <summary>Copies to a file in the format of its ending; it appears whole or not at all.</summary>
    /// <param name="source">The table.</param>
    /// <param name="dialect">How delimited text is written.</param>
    /// <param name="added">The columns to add, one cell for each row of the source.</param>
    /// <param name="target">The file; it may exist, and is then replaced.</param>
    /// <exception cref="RefusalException">The source cannot be read, or a column cannot be written in the format.</exception>
    /// <exception cref="IOException">The target cannot be written.</exception>
    public static void Write(string source, TextDialect dialect, IReadOnlyList<AddedColumn> added, string target)
    {
        RequireFormat(target);
        string full = Path.GetFullPath(target);
        string partial = Path.Combine(Path.GetDirectoryName(full)!, $".{Path.GetFileName(full)}.partial");
        WritePartial(source, dialect, added, partial, DelimiterOf(target));
        File.Move(partial, full, overwrite: true);
    }

    /// <summary>Copies as delimited text.</summary>
    /// <param name="source">The table.</param>
    /// <param name="dialect">How delimited text is written.</param>
    /// <param name="added">The columns to add.</param>
    /// <param name="target">Where the text goes.</param>
    /// <param name="delimiter">The delimiter of the target.</param>
    public static void Write(string source, TextDialect dialect, IReadOnlyList<AddedColumn> added, TextWriter target, char delimiter)
    {
        var cells = new DelimitedWriter(target, delimiter);
        foreach (string name in HeaderOf(source, dialect)) cells.Add(name);
        foreach (AddedColumn column in added) cells.Add(column.Column.Name);
        cells.EndRow();
        int row = 0;
        foreach (string?[] record in Records(source, dialect))
        {
            foreach (string? cell in record) cells.Add(cell);
            foreach (AddedColumn column in added) cells.Add(column.Text(row));
            cells.EndRow();
            row++;
        }
    }

    private static void WritePartial(string source, TextDialect dialect, IReadOnlyList<AddedColumn> added, string partial, char? delimiter)
    {
        if (delimiter is { } separator)
        {
            using var file = new WrittenFile(partial);
            file.Guarded(() =>
            {
                using var writer = new StreamWriter(file.Stream, new UTF8Encoding(false), leaveOpen: true);
                Write(source, dialect, added, writer, separator);
            });
            file.Complete();
        }
        else if (TextTable.IsParquet(source))
        {
            ParquetCopy.Write(source, added, partial);
        }
        else
        {
            WriteAsParquet(source, dialect, added, partial);
        }
    }

    // Text stays text: which columns are numbers is for its reader to say.
    private static void WriteAsParquet(string source, TextDialect dialect, IReadOnlyList<AddedColumn> added, string partial)
    {
        IReadOnlyList<string> header = HeaderOf(source, dialect);
        if (header.Any(name => name.Length == 0))
            throw new RefusalException(InputFile.ShortName(source), "a column has no name", "a name for every column, since Parquet needs one", "Name the column, or write CSV.");
        TableColumn[] schema = [.. header.Select(name => new TableColumn(name, ColumnType.Text)), .. added.Select(column => column.Column)];
        using var sink = new ParquetTableSink(partial, schema);
        var batch = new TableBatch(schema, BatchRows);
        int row = 0;
        foreach (string?[] record in Records(source, dialect))
        {
            for (int cell = 0; cell < record.Length; cell++) batch.Text(cell)[batch.Rows] = record[cell];
            for (int column = 0; column < added.Count; column++)
            {
                if (added[column].Column.Type == ColumnType.Real) batch.Reals(header.Count + column)[batch.Rows] = added[column].Reals[row];
                else batch.Truths(header.Count + column)[batch.Rows] = added[column].Truths[row];
            }
            row++;
            batch.Rows++;
            batch.FlushWhenFull(sink);
        }
        batch.Flush(sink);
        sink.Complete();
    }

    private static IReadOnlyList<string> HeaderOf(string source, TextDialect dialect) =>
        TextTable.IsParquet(source) ? ParquetTextTable.ReadHeader(source) : DelimitedText.Open(source, dialect).Columns;

    private static IEnumerable<string?[]> Records(string source, TextDialect dialect) =>
        TextTable.IsParquet(source) ? ParquetRecords(source) : DelimitedRecords(source, dialect);

    private static IEnumerable<string?[]> DelimitedRecords(string source, TextDialect dialect)
    {
        DelimitedText text = DelimitedText.Open(source, dialect);
        foreach (TextChunk chunk in text.Chunks(int.MaxValue, ChunkBytes))
        {
            using (var reader = new ChunkReader(text, chunk))
            {
                string?[] record = new string?[text.Columns.Length];
                while (reader.MoveNext())
                {
                    if (reader.EndsRecord) text.RequireWidth(reader.FirstColumn + reader.Cells, reader.Line);
                    int cells = Math.Min(reader.Cells, record.Length - reader.FirstColumn);
                    for (int cell = 0; cell < cells; cell++) record[reader.FirstColumn + cell] = reader.Verbatim(cell).ToString();
                    if (reader.EndsRecord) yield return record;
                }
            }
            chunk.Release();
        }
    }

    private static IEnumerable<string?[]> ParquetRecords(string source)
    {
        using ParquetTable table = ParquetTable.Open(source);
        for (int group = 0; group < table.RowsOfGroup.Count; group++)
        {
            int number = group;
            string?[][] columns = [.. Enumerable.Range(0, table.Columns.Count).Select(column => ParquetTexts.Read(table, number, column))];
            for (int row = 0; row < table.RowsOfGroup[group]; row++)
            {
                int at = row;
                yield return Array.ConvertAll(columns, column => column[at]);
            }
        }
    }

    private static char? DelimiterOf(string path)
    {
        foreach (var (ending, delimiter) in TextFormats)
        {
            if (path.EndsWith(ending, StringComparison.OrdinalIgnoreCase)) return delimiter;
        }
        return null;
    }
}
