using System.Buffers;

namespace MatchedSuite.Storage.Text;

/// <summary>A chunk as characters for the parser; one very long record as several lines, cut between cells.</summary>
/// <remarks>The parser then keeps to buffers of a piece's size, where a line of many million characters would make it double them again and again.</remarks>
internal sealed class RecordPieces : TextReader
{
    private const int LongRecord = 1 << 22;
    private const int PieceBytes = 1 << 18;

    private readonly DelimitedText _text;
    private readonly TextChunk _chunk;
    private readonly List<int> _ends = [];
    private readonly char[] _characters;
    private ReadOnlyMemory<char> _rest;
    private int _next;

    /// <exception cref="RefusalException">A cell of a long record is longer than a piece.</exception>
    public RecordPieces(DelimitedText text, TextChunk chunk)
    {
        _text = text;
        _chunk = chunk;
        int length = chunk.Bytes.Length;
        if (chunk.Records == 1 && length > LongRecord)
            for (int start = 0; length - start > PieceBytes; start = _ends[^1] + 1)
                _ends.Add(start + LastDelimiter(chunk.Bytes.Slice(start, PieceBytes)));
        _ends.Add(length);
        _characters = ArrayPool<char>.Shared.Rent((Count > 1 ? PieceBytes : length) + 1);
    }

    /// <summary>Number of pieces; 1 for a chunk that is handed over whole.</summary>
    public int Count => _ends.Count;

    public override int Read(Span<char> buffer)
    {
        if (_rest.IsEmpty && _next < _ends.Count) Decode();
        int count = Math.Min(buffer.Length, _rest.Length);
        _rest.Span[..count].CopyTo(buffer);
        _rest = _rest[count..];
        return count;
    }

    public override int Read(char[] buffer, int index, int count) => Read(buffer.AsSpan(index, count));

    public override int Read()
    {
        Span<char> one = stackalloc char[1];
        return Read(one) == 0 ? -1 : one[0];
    }

    protected override void Dispose(bool disposing)
    {
        // The parser disposes its reader too; the array goes back once.
        if (disposing && _next >= 0)
        {
            _next = -1;
            _rest = default;
            ArrayPool<char>.Shared.Return(_characters);
        }
        base.Dispose(disposing);
    }

    private void Decode()
    {
        int start = _next == 0 ? 0 : _ends[_next - 1] + 1;
        ReadOnlySpan<byte> piece = _chunk.Bytes[start.._ends[_next]];
        int length = TextEncodings.Decode(_text.Path, _chunk.FirstLine, piece, _characters);
        // The delimiter at the cut becomes a line end; so does the end of a last piece that is one empty cell.
        if (_next < _ends.Count - 1 || piece.IsEmpty) _characters[length++] = '\n';
        _rest = _characters.AsMemory(0, length);
        _next++;
    }

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
            $"a cell is longer than {PieceBytes} characters", "shorter cells", "Look for a quote that is never closed.");
    }
}
