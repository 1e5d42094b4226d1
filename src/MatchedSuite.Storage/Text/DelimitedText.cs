using MatchedSuite.Storage.Files;
using nietras.SeparatedValues;

namespace MatchedSuite.Storage.Text;

/// <summary>A delimited text file whose header has been read: its delimiter, its columns, its chunks.</summary>
internal sealed class DelimitedText
{
    private const int HeaderBytes = 1 << 16;

    // Wider tables get a chunk a record, so that a record can come in pieces.
    private const int WideHeader = 1 << 20;

    private readonly bool _wide;

    private DelimitedText(string path, char delimiter, TextChunk header)
    {
        Path = path;
        Delimiter = delimiter;
        Parser = new SepReaderOptions(new Sep(delimiter)) { HasHeader = false, Unescape = true, DisableColCountCheck = true };
        _wide = header.Bytes.Length > WideHeader;
        Columns = Cells(header);
    }

    public string Path { get; }

    public char Delimiter { get; }

    /// <summary>The parser's settings; the number of cells is checked by the callers, whose messages know the columns.</summary>
    public SepReaderOptions Parser { get; }

    /// <summary>The header's cells, trimmed; several may be empty, none stands twice.</summary>
    public string[] Columns { get; }

    /// <summary>Reads the header.</summary>
    /// <exception cref="RefusalException">The file cannot be opened or is no text; a column stands twice; the delimiter is no delimiter.</exception>
    public static DelimitedText Open(string path, TextDialect dialect)
    {
        using var cutter = new RecordCutter(path);
        TextChunk header = cutter.Next(1, HeaderBytes)
            ?? throw new RefusalException(InputFile.ShortName(path), "the file holds blank lines only", "a header and at least one row");
        try
        {
            if (header.Records > 1)
                throw new RefusalException($"{InputFile.ShortName(path)}, line 1", "the line is blank", "the header", "Remove the blank lines above it.");
            char delimiter = dialect.Delimiter ?? DelimiterSearch.In(header.Bytes, dialect.DecimalMark);
            RequireDelimiter(path, delimiter, dialect.DecimalMark);
            var text = new DelimitedText(path, delimiter, header);
            ColumnNames.RequireDistinct(InputFile.ShortName(path), text.Columns);
            return text;
        }
        finally
        {
            header.Release();
        }
    }

    /// <summary>The chunks after the header, in file order.</summary>
    /// <exception cref="RefusalException">The file has a header only.</exception>
    public IEnumerable<TextChunk> Chunks(int records, int bytes)
    {
        using var cutter = new RecordCutter(Path);
        cutter.Next(1, HeaderBytes)?.Release();
        bool any = false;
        while (cutter.Next(_wide ? 1 : records, bytes) is { } chunk)
        {
            any = true;
            yield return chunk;
        }
        if (!any) throw HeaderOnly(Path);
    }

    /// <summary>Refuses a file without a row.</summary>
    public void RequireRows()
    {
        using var cutter = new RecordCutter(Path);
        cutter.Next(1, HeaderBytes)?.Release();
        TextChunk first = cutter.Next(1, HeaderBytes) ?? throw HeaderOnly(Path);
        first.Release();
    }

    /// <summary>A place in the file, as messages show it.</summary>
    public string Place(long line) => $"{InputFile.ShortName(Path)}, line {line}";

    /// <summary>Refuses a record that has not one cell for each column.</summary>
    public void RequireWidth(int cells, long line)
    {
        if (cells == Columns.Length) return;
        string found = cells == 1 && Columns.Length > 1
            ? "the line is blank or has one cell"
            : $"the line has {cells} cells";
        string remedy = cells == Columns.Length + 1
            ? "A cell that holds the delimiter must be quoted; if every line has one cell more, the header lacks a name for the first column."
            : "A cell that holds the delimiter must be quoted.";
        throw new RefusalException(Place(line), found, $"{Columns.Length} cells, one for each column of the header", remedy);
    }

    internal static RefusalException HeaderOnly(string path) =>
        new(InputFile.ShortName(path), "the file holds a header and no row", "a header and at least one row");

    private string[] Cells(TextChunk header)
    {
        var names = new List<string>();
        using var reader = new ChunkReader(this, header);
        while (reader.MoveNext())
            for (int cell = 0; cell < reader.Cells; cell++)
                names.Add(reader[cell].ToString());
        return [.. names];
    }

    private static void RequireDelimiter(string path, char delimiter, char decimalMark)
    {
        bool usable = delimiter == '\t' || (delimiter is > ' ' and < (char)127 && delimiter != '"' && !char.IsAsciiLetterOrDigit(delimiter));
        if (usable && delimiter != decimalMark) return;
        throw new RefusalException(InputFile.ShortName(path),
            delimiter == decimalMark ? $"'{delimiter}' is asked for as delimiter and as decimal mark" : $"'{delimiter}' is asked for as delimiter",
            "a delimiter among ',' ';' tab '|' that is not the decimal mark", "Correct data.delimiter or data.decimal in the study file.");
    }
}
