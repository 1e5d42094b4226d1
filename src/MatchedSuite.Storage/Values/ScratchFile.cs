using Microsoft.Win32.SafeHandles;

namespace MatchedSuite.Storage.Values;

/// <summary>Room on disk for values that do not fit in memory, gone when disposed or when the process ends.</summary>
/// <remarks>Several threads may read and write it at once.</remarks>
public sealed class ScratchFile : IDisposable
{
    private readonly string _path;
    private readonly SafeFileHandle _handle;

    /// <summary>Reserves the room at once, so that a full disk shows before hours of work.</summary>
    /// <param name="folder">Folder of the file.</param>
    /// <param name="bytes">Bytes to reserve; 0 where it is not known how many there will be.</param>
    /// <exception cref="IOException">The folder has no room or may not be written; the message names it.</exception>
    public ScratchFile(string folder, long bytes)
    {
        _path = Path.Combine(folder, $"matched-{Guid.NewGuid():N}.scratch");
        try
        {
            Directory.CreateDirectory(folder);
            _handle = File.OpenHandle(_path, FileMode.CreateNew, FileAccess.ReadWrite, FileShare.Delete,
                FileOptions.DeleteOnClose, preallocationSize: bytes);
            // Where an open file can lose its name, nothing stays behind even if the process is killed.
            if (!OperatingSystem.IsWindows()) File.Delete(_path);
        }
        catch (Exception failure) when (failure is IOException or UnauthorizedAccessException)
        {
            _handle?.Dispose();
            throw new IOException($"A scratch file of {bytes} bytes cannot be made in '{folder}': {failure.Message}", failure);
        }
    }

    /// <summary>Writes bytes from the offset on.</summary>
    /// <exception cref="IOException">The disk is full; the message names the file.</exception>
    public void Write(long offset, ReadOnlySpan<byte> bytes)
    {
        try
        {
            RandomAccess.Write(_handle, bytes, offset);
        }
        catch (IOException failure)
        {
            throw new IOException($"The scratch file '{_path}' cannot be written: {failure.Message}", failure);
        }
    }

    /// <summary>Fills the target from the offset on.</summary>
    public void Read(long offset, Span<byte> target)
    {
        while (!target.IsEmpty)
        {
            int read = RandomAccess.Read(_handle, target, offset);
            if (read == 0) throw new IOException($"The scratch file '{_path}' is shorter than what was written to it.");
            target = target[read..];
            offset += read;
        }
    }

    /// <summary>Closes the file, which is then gone.</summary>
    public void Dispose() => _handle.Dispose();
}
