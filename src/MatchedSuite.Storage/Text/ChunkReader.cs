using System.Buffers;
using nietras.SeparatedValues;

namespace MatchedSuite.Storage.Text;

/// <summary>Reads the records of one chunk, cell by cell.</summary>
/// <remarks>
/// A record that is longer than the parser takes at once (a sample row with a million endpoints) comes in several pieces,
/// cut between cells; <see cref="FirstColumn"/> and <see cref="EndsRecord"/> tell. All other records are one piece.
/// </remarks>
internal sealed class ChunkReader : IDisposable
{
    // The parser takes rows up to 2^24 characters; pieces a good deal shorter stay in the processor's cache as well.
    private const int PieceBytes = 1 << 22;

    private readonly DelimitedText _text;
    private readonly TextChunk _chunk;
    private readonly bool _inPieces;
    private readonly char[] _characters;
    private readonly LentText _lent = new();
    private SepReader? _rows;
    private int _position;
    private int _seen;

    public ChunkReader(DelimitedText text, TextChunk chunk)
    {
        _text = text;
        _chunk = chunk;
        _inPieces = chunk.Records == 1 && chunk.Bytes.Length > PieceBytes;
        _characters = ArrayPool<char>.Shared.Rent(Math.Min(chunk.Bytes.Length, _inPieces ? PieceBytes : int.MaxValue) + 1);
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
    public ReadOnlySpan<char> this[int cell] => Trimmed(_rows!.Current[cell].Span);

    /// <summary>Goes to the next piece; false at the end of the chunk.</summary>
    public bool MoveNext()
    {
        try
        {
            return _inPieces ? MovePiece() : MoveRow();
        }
        catch (Exception failure) when (failure is InvalidDataException or NotSupportedException)
        {
            throw new RefusalException(_text.Place(_chunk.FirstLine), "a record here or further down cannot be taken apart",
                "records of at most 16 million characters with closed quotes",
                "Very wide tables are best kept with one row an endpoint, or as Parquet.", failure);
        }
    }

    public void Dispose()
    {
        _rows?.Dispose();
        ArrayPool<char>.Shared.Return(_characters);
    }

    private bool MoveRow()
    {
        if (_rows is null)
        {
            int length = TextEncodings.Decode(_text.Path, _chunk.FirstLine, _chunk.Bytes, _characters);
            _rows = Open(length);
        }
        if (!_rows.MoveNext())
        {
            if (_seen != _chunk.Records) throw MixedLineEnds();
            return false;
        }
        var row = _rows.Current;
        // The parser gives the first row, when it is no header, the line on which it ends.
        Line = _seen == 0 ? _chunk.FirstLine : _chunk.FirstLine + row.LineNumberFrom - 1;
        _seen++;
        Cells = row.ColCount;
        EndsRecord = true;
        return true;
    }

    private bool MovePiece()
    {
        if (EndsRecord) return false;
        Line = _chunk.FirstLine;
        FirstColumn += Cells;
        ReadOnlySpan<byte> rest = _chunk.Bytes[_position..];
        int end = rest.Length <= PieceBytes ? rest.Length : LastDelimiter(rest[..PieceBytes]);
        EndsRecord = end == rest.Length;
        int length = TextEncodings.Decode(_text.Path, _chunk.FirstLine, rest[..end], _characters);
        // A piece that is one empty cell is a row only if it has a line end.
        if (!EndsRecord || end == 0) _characters[length++] = '\n';
        _position += end + 1;
        _rows?.Dispose();
        _rows = Open(length);
        _rows.MoveNext();
        Cells = _rows.Current.ColCount;
        return true;
    }

    // Line numbers would be wrong from here on, and with them every message.
    private RefusalException MixedLineEnds() =>
        new(_text.Place(_chunk.FirstLine), "some lines here or further down end by a carriage return alone, others do not",
            "one kind of line end", "Save the file with Unix or Windows line ends.");

    private int LastDelimiter(ReadOnlySpan<byte> bytes)
    {
        byte delimiter = (byte)_text.Delimiter;
        int last = -1;
        if (!bytes.Contains((byte)'"')) last = bytes.LastIndexOf(delimiter);
        else
        {
            bool quoted = false;
            for (int i = 0; i < bytes.Length; i++)
            {
                if (bytes[i] == '"') quoted = !quoted;
                else if (bytes[i] == delimiter && !quoted) last = i;
            }
        }
        return last >= 0 ? last : throw new RefusalException(_text.Place(_chunk.FirstLine),
            $"a cell is longer than {PieceBytes >> 20} million characters", "shorter cells", "Look for a quote that is never closed.");
    }

    private SepReader Open(int length)
    {
        _lent.Lend(_characters.AsMemory(0, length));
        return _text.Parser.From(_lent);
    }

    private static ReadOnlySpan<char> Trimmed(ReadOnlySpan<char> cell)
    {
        if (cell.IsEmpty || (IsInk(cell[0]) && IsInk(cell[^1]))) return cell;
        return cell.Trim();
    }

    private static bool IsInk(char c) => (uint)(c - '!') <= '~' - '!';

    private sealed class LentText : TextReader
    {
        private ReadOnlyMemory<char> _rest;

        public void Lend(ReadOnlyMemory<char> characters) => _rest = characters;

        public override int Read(Span<char> buffer)
        {
            int count = Math.Min(buffer.Length, _rest.Length);
            _rest.Span[..count].CopyTo(buffer);
            _rest = _rest[count..];
            return count;
        }

        public override int Read(char[] buffer, int index, int count) => Read(buffer.AsSpan(index, count));

        public override int Peek() => _rest.IsEmpty ? -1 : _rest.Span[0];

        public override int Read()
        {
            int next = Peek();
            if (next >= 0) _rest = _rest[1..];
            return next;
        }
    }
}
