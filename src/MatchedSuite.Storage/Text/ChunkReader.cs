using nietras.SeparatedValues;

namespace MatchedSuite.Storage.Text;

/// <summary>Reads the records of one chunk, cell by cell.</summary>
/// <remarks>
/// A record that is longer than the parser should take at once (a sample row with a million endpoints) comes in several pieces,
/// cut between cells; <see cref="FirstColumn"/> and <see cref="EndsRecord"/> tell. All other records are one piece.
/// </remarks>
internal sealed class ChunkReader : IDisposable
{
    private readonly DelimitedText _text;
    private readonly TextChunk _chunk;
    private readonly RecordPieces _pieces;
    private readonly SepReader _rows;
    private int _seen;

    public ChunkReader(DelimitedText text, TextChunk chunk)
    {
        _text = text;
        _chunk = chunk;
        _pieces = new RecordPieces(text, chunk);
        _rows = text.Parser.From(_pieces);
    }

    /// <summary>Line on which the current record begins.</summary>
    public long Line { get; private set; }

    /// <summary>Column of the piece's first cell; 0 unless a record comes in pieces.</summary>
    public int FirstColumn { get; private set; }

    /// <summary>Cells in the piece.</summary>
    public int Cells { get; private set; }

    /// <summary>True for the last or only piece of a record.</summary>
    public bool EndsRecord { get; private set; }

    /// <summary>A cell of the piece, unquoted and trimmed; valid until the next move.</summary>
    public ReadOnlySpan<char> this[int cell] => Trimmed(_rows.Current[cell].Span);

    /// <summary>A cell of the piece, unquoted and with its blanks; valid until the next move.</summary>
    public ReadOnlySpan<char> Verbatim(int cell) => _rows!.Current[cell].Span;

    /// <summary>Goes to the next piece; false at the end of the chunk.</summary>
    public bool MoveNext()
    {
        int expected = _pieces.Count > 1 ? _pieces.Count : _chunk.Records;
        if (!Advance())
            return _seen == expected ? false : throw MixedLineEnds();
        var row = _rows.Current;
        if (_pieces.Count > 1)
        {
            Line = _chunk.FirstLine;
            FirstColumn += Cells;
            EndsRecord = _seen + 1 == expected;
        }
        else
        {
            // The parser gives the first row, when it is no header, the line on which it ends.
            Line = _seen == 0 ? _chunk.FirstLine : _chunk.FirstLine + row.LineNumberFrom - 1;
            EndsRecord = true;
        }
        Cells = row.ColCount;
        _seen++;
        return true;
    }

    public void Dispose()
    {
        _rows.Dispose();
        _pieces.Dispose();
    }

    private bool Advance()
    {
        try
        {
            return _rows.MoveNext();
        }
        catch (Exception failure) when (failure is InvalidDataException or NotSupportedException)
        {
            throw new RefusalException(_text.Place(_chunk.FirstLine), "a record here or further down cannot be taken apart",
                "records of at most 16 million characters with closed quotes",
                "Very wide tables are best kept with one row an endpoint, or as Parquet.", failure);
        }
    }

    // Line numbers would be wrong from here on, and with them every message.
    private RefusalException MixedLineEnds() =>
        new(_text.Place(_chunk.FirstLine), "some lines here or further down end by a carriage return alone, others do not",
            "one kind of line end", "Save the file with Unix or Windows line ends.");

    private static ReadOnlySpan<char> Trimmed(ReadOnlySpan<char> cell)
    {
        if (cell.IsEmpty || (IsInk(cell[0]) && IsInk(cell[^1]))) return cell;
        return cell.Trim();
    }

    private static bool IsInk(char c) => (uint)(c - '!') <= '~' - '!';
}
