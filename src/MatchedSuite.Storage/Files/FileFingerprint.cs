using System.Security.Cryptography;

namespace MatchedSuite.Storage.Files;

/// <summary>Size and SHA-256 of a file: what a manifest keeps of an input, so that a later reader can tell it is the same.</summary>
/// <param name="Bytes">Length in bytes.</param>
/// <param name="Sha256">The digest, 64 hexadecimal digits in lower case (FIPS 180-4).</param>
public sealed record FileFingerprint(long Bytes, string Sha256)
{
    private const int BufferBytes = 1 << 18;

    /// <summary>Reads a file once, in bounded memory.</summary>
    /// <exception cref="RefusalException">The file cannot be opened.</exception>
    public static FileFingerprint Of(string path)
    {
        using FileStream stream = InputFile.Open(path);
        using var digest = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        byte[] buffer = new byte[BufferBytes];
        long bytes = 0;
        for (int read; (read = stream.Read(buffer)) > 0; bytes += read)
            digest.AppendData(buffer, 0, read);
        return new FileFingerprint(bytes, Convert.ToHexStringLower(digest.GetHashAndReset()));
    }
}
