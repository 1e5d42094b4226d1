namespace MatchedSuite.Storage.Tables;

/// <summary>A file that a sink writes: its failures name it, and it disappears when it is not completed.</summary>
/// <remarks>What was there before under that name (an older file, a device) is written over and never deleted.</remarks>
internal sealed class WrittenFile : IDisposable
{
    private const int BufferBytes = 1 << 16;

    private readonly string _path;
    private readonly bool _new;
    private bool _completed;

    /// <exception cref="IOException">The file cannot be made; the message names it.</exception>
    public WrittenFile(string path)
    {
        _path = path;
        _new = !File.Exists(path);
        Stream = Guarded(() => new FileStream(path, FileMode.Create, FileAccess.Write, FileShare.Read, BufferBytes));
    }

    public FileStream Stream { get; }

    /// <summary>Runs a write.</summary>
    /// <exception cref="IOException">The disk is full or the folder may not be written; the message names the file.</exception>
    public T Guarded<T>(Func<T> write)
    {
        try
        {
            return write();
        }
        catch (Exception failure) when (failure is IOException or UnauthorizedAccessException)
        {
            throw new IOException($"'{_path}' cannot be written: {failure.Message}", failure);
        }
    }

    /// <summary>Runs a write.</summary>
    /// <exception cref="IOException">As above.</exception>
    public void Guarded(Action write) => Guarded(() =>
    {
        write();
        return true;
    });

    /// <summary>Brings all bytes to the disk's keeper and keeps the file.</summary>
    public void Complete()
    {
        Guarded(Stream.Flush);
        _completed = true;
    }

    public void Dispose()
    {
        try
        {
            Stream.Dispose();
        }
        catch (IOException) when (!_completed)
        {
            // What could not be written is given up anyway; the failure has been told by the write that met it.
        }
        if (!_completed && _new) File.Delete(_path);
    }
}
