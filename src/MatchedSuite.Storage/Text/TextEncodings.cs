using System.Text;
using MatchedSuite.Storage.Files;

namespace MatchedSuite.Storage.Text;

/// <summary>Bytes to characters, refusing what is no UTF-8: a wrong encoding would silently change names.</summary>
internal static class TextEncodings
{
    public const string Accepted = "UTF-8, or UTF-16 that begins with a byte order mark";
    public const string Remedy = "Save the file as UTF-8 (in a spreadsheet: 'CSV UTF-8').";

    private static readonly UTF8Encoding Strict = new(false, throwOnInvalidBytes: true);

    /// <summary>Decodes whole records into <paramref name="target"/>, which holds at least as many characters as there are bytes.</summary>
    public static int Decode(string path, long firstLine, ReadOnlySpan<byte> bytes, Span<char> target)
    {
        // UTF-16 without its mark is valid UTF-8 full of NUL characters.
        int nul = bytes.IndexOf((byte)0);
        if (nul >= 0)
            throw Refusal(path, firstLine, bytes[..nul], "the text holds a NUL character, so it is UTF-16 without its mark, or not text");
        try
        {
            return Strict.GetChars(bytes, target);
        }
        catch (DecoderFallbackException failure)
        {
            int index = FirstInvalid(bytes);
            throw Refusal(path, firstLine, bytes[..index], $"the byte 0x{bytes[index]:X2} is not UTF-8", failure);
        }
    }

    private static int FirstInvalid(ReadOnlySpan<byte> bytes)
    {
        int index = 0;
        while (index < bytes.Length && Rune.DecodeFromUtf8(bytes[index..], out _, out int used) == System.Buffers.OperationStatus.Done)
            index += used;
        return index;
    }

    private static RefusalException Refusal(string path, long firstLine, ReadOnlySpan<byte> before, string found, Exception? cause = null)
    {
        long line = firstLine + Math.Max(before.Count((byte)'\n'), before.Count((byte)'\r'));
        return new RefusalException($"{InputFile.ShortName(path)}, line {line}", found, Accepted, Remedy, cause);
    }
}
