using System.Text;
using MatchedSuite.Storage.Files;

namespace MatchedSuite.Storage.Text;

/// <summary>A text file as a stream of UTF-8 bytes without a byte order mark, whatever mark it began with.</summary>
internal sealed class Utf8Input : IDisposable
{
    private readonly FileStream _file;
    private readonly Stream _bytes;

    private Utf8Input(FileStream file, Stream bytes)
    {
        _file = file;
        _bytes = bytes;
    }

    /// <summary>Share of the file read so far, in [0, 1].</summary>
    public double Reached => (double)_file.Position / _file.Length;

    public static Utf8Input Open(string path)
    {
        FileStream file = InputFile.Open(path);
        try
        {
            Span<byte> start = stackalloc byte[4];
            int known = file.ReadAtLeast(start, start.Length, throwOnEndOfStream: false);
            start = start[..known];
            RefuseForeign(path, start);
            return new Utf8Input(file, Marked(file, start));
        }
        catch
        {
            file.Dispose();
            throw;
        }
    }

    /// <summary>Reads some bytes; 0 at the end.</summary>
    /// <exception cref="DecoderFallbackException">UTF-16 with a broken surrogate pair.</exception>
    public int Read(Span<byte> target) => _bytes.Read(target);

    public void Dispose()
    {
        _bytes.Dispose();
        _file.Dispose();
    }

    private static Stream Marked(FileStream file, ReadOnlySpan<byte> start)
    {
        if (start.StartsWith<byte>([0xEF, 0xBB, 0xBF])) file.Position = 3;
        else if (start.StartsWith<byte>([0xFF, 0xFE])) return Transcoded(file, bigEndian: false);
        else if (start.StartsWith<byte>([0xFE, 0xFF])) return Transcoded(file, bigEndian: true);
        else file.Position = 0;
        return file;
    }

    private static Stream Transcoded(FileStream file, bool bigEndian)
    {
        file.Position = 2;
        var encoding = new UnicodeEncoding(bigEndian, byteOrderMark: false, throwOnInvalidBytes: true);
        return Encoding.CreateTranscodingStream(file, encoding, new UTF8Encoding(false, true), leaveOpen: true);
    }

    // Three mistakes that are common enough to be named instead of "not UTF-8 in line 1".
    private static void RefuseForeign(string path, ReadOnlySpan<byte> start)
    {
        string? kind =
            start.SequenceEqual("PAR1"u8) ? "a Parquet file" :
            start.StartsWith<byte>([0x1F, 0x8B]) ? "compressed with gzip" :
            start.StartsWith("PK\u0003\u0004"u8) ? "a workbook or a zip archive" : null;
        if (kind is null) return;
        throw new RefusalException(InputFile.ShortName(path), $"this is {kind}", "delimited text",
            kind == "a Parquet file" ? "Give its name the ending .parquet." : "Unpack it, or save the sheet as CSV (UTF-8).");
    }
}
