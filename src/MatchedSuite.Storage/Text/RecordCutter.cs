using System.Buffers;
using System.Text;
using MatchedSuite.Storage.Files;

namespace MatchedSuite.Storage.Text;

/// <summary>Cuts a delimited text file into chunks of whole records, so that other threads can parse them.</summary>
/// <remarks>
/// A line end inside quotes ends no record (RFC 4180). Blank lines at the end of the file are dropped; blank lines before
/// other records stay, since whoever parses them must refuse them. The cutter looks for quotes and line ends alone.
/// </remarks>
internal sealed class RecordCutter : IDisposable
{
    /// <summary>A record beyond this is taken for an unterminated quote.</summary>
    public const int LongestRecord = 1 << 28;

    private const int BufferBytes = 1 << 22;

    private readonly string _path;
    private readonly Utf8Input _input;
    private byte[] _buffer = ArrayPool<byte>.Shared.Rent(BufferBytes);
    private int _start;
    private int _end;
    private bool _atEnd;
    private byte _lineEnd;
    private long _line = 1;
    private long _record;

    public RecordCutter(string path)
    {
        _path = path;
        _input = Utf8Input.Open(path);
    }

    /// <summary>The next chunk, or null at the end.</summary>
    /// <param name="records">Most records it may hold.</param>
    /// <param name="bytes">Length at which it is cut, after the record that reaches it.</param>
    /// <exception cref="RefusalException">A quote is not closed; the text is UTF-16 and broken.</exception>
    public TextChunk? Next(int records, int bytes)
    {
        // Refilling only when three quarters are used moves each byte once, however small the chunks are.
        if (_end - _start < bytes && (_start > _buffer.Length / 4 * 3 || _end == 0)) Fill();
        if (_lineEnd == 0) _lineEnd = FindLineEnd();

        int position = _start, recordStart = _start, lastEnd = _start, found = 0, blanks = 0;
        bool quoted = false;
        while (true)
        {
            int step = _buffer.AsSpan(position, _end - position).IndexOfAny((byte)'"', _lineEnd);
            if (step < 0)
            {
                if (_atEnd)
                {
                    if (quoted) throw Unterminated(recordStart);
                    if (!IsBlank(recordStart, _end)) { lastEnd = _end; found += 1 + blanks; }
                    break;
                }
                if (lastEnd > _start) break;
                int scanned = _end - _start;
                int offset = recordStart - _start;
                if (scanned > LongestRecord) throw TooLong(recordStart);
                Fill();
                position = _start + scanned;
                recordStart = _start + offset;
                lastEnd = _start;
                continue;
            }
            position += step + 1;
            if (_buffer[position - 1] == '"') { quoted = !quoted; continue; }
            if (quoted) continue;
            if (IsBlank(recordStart, position)) blanks++;
            else
            {
                found += 1 + blanks;
                blanks = 0;
                lastEnd = position;
                if (found >= records || lastEnd - _start >= bytes) break;
            }
            recordStart = position;
        }
        if (lastEnd > _start) return Cut(lastEnd, found);
        return null;
    }

    public void Dispose()
    {
        _input.Dispose();
        byte[] lent = Interlocked.Exchange(ref _buffer, []);
        if (lent.Length > 0) ArrayPool<byte>.Shared.Return(lent);
    }

    private TextChunk Cut(int end, int records)
    {
        int length = end - _start;
        byte[] copy = ArrayPool<byte>.Shared.Rent(length);
        _buffer.AsSpan(_start, length).CopyTo(copy);
        var chunk = new TextChunk(copy, length, _line, _record, records, _atEnd && end == _end ? 1 : _input.Reached);
        _line += copy.AsSpan(0, length).Count(_lineEnd);
        _record += records;
        _start = end;
        return chunk;
    }

    private bool IsBlank(int from, int to)
    {
        // Nearly every record is told by its first byte.
        if (from < to && _buffer[from] is not ((byte)' ' or (byte)'\r' or (byte)'\n')) return false;
        return !_buffer.AsSpan(from, to - from).ContainsAnyExcept((byte)' ', (byte)'\r', (byte)'\n');
    }

    // Files of old machines end lines by a carriage return alone; the first line end outside quotes tells.
    private byte FindLineEnd()
    {
        bool quoted = false;
        for (int i = _start; ; i++)
        {
            if (i + 1 >= _end && !_atEnd)
            {
                int offset = i - _start;
                Fill();
                i = _start + offset;
            }
            if (i >= _end) return (byte)'\n';
            byte b = _buffer[i];
            if (b == '"') quoted = !quoted;
            if (quoted) continue;
            if (b == '\n') return b;
            if (b == '\r') return i + 1 < _end && _buffer[i + 1] == '\n' ? (byte)'\n' : b;
        }
    }

    private void Fill()
    {
        int kept = _end - _start;
        if (kept > _buffer.Length / 2)
        {
            byte[] larger = ArrayPool<byte>.Shared.Rent(2 * _buffer.Length);
            _buffer.AsSpan(_start, kept).CopyTo(larger);
            ArrayPool<byte>.Shared.Return(_buffer);
            _buffer = larger;
        }
        else
        {
            _buffer.AsSpan(_start, kept).CopyTo(_buffer);
        }
        _start = 0;
        _end = kept;
        try
        {
            while (_end < _buffer.Length)
            {
                int read = _input.Read(_buffer.AsSpan(_end));
                if (read == 0) { _atEnd = true; return; }
                _end += read;
            }
        }
        catch (DecoderFallbackException failure)
        {
            throw new RefusalException(Place(_line), "the text is not valid UTF-16 here or some lines further down", TextEncodings.Accepted,
                TextEncodings.Remedy, failure);
        }
        catch (IOException failure)
        {
            throw new RefusalException(_path, $"it cannot be read to its end ({failure.Message})", "a file that can be read", "", failure);
        }
    }

    private RefusalException Unterminated(int recordStart) =>
        new(Place(LineOf(recordStart)), "a quote is opened in this record and never closed", "an even number of quotes (\") in each record",
            "Close the quote, or write a quote that is part of a text twice.");

    private RefusalException TooLong(int recordStart) =>
        new(Place(LineOf(recordStart)), $"the record that begins here does not end within {LongestRecord >> 20} MiB",
            "a line end", "Look for a quote that is opened and never closed.");

    private long LineOf(int position) => _line + _buffer.AsSpan(_start, position - _start).Count(_lineEnd);

    private string Place(long line) => $"{InputFile.ShortName(_path)}, line {line}";
}
