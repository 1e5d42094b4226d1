namespace MatchedSuite.Storage.Files;

/// <summary>An input file at the moment it is opened: what can be wrong with it before a byte of it is understood.</summary>
public static class InputFile
{
    /// <summary>Opens a file for reading from its start to its end.</summary>
    /// <exception cref="RefusalException">The file is missing, a folder, a pipe, empty, or may not be read.</exception>
    public static FileStream Open(string path)
    {
        ArgumentException.ThrowIfNullOrEmpty(path);
        if (Directory.Exists(path))
            throw new RefusalException(path, "this is a folder", "a file", "Name one file in it.");
        FileStream stream;
        try
        {
            stream = new FileStream(path, new FileStreamOptions { BufferSize = 0, Options = FileOptions.SequentialScan });
        }
        catch (Exception failure) when (failure is IOException or UnauthorizedAccessException)
        {
            throw Unopened(path, failure);
        }
        try
        {
            if (!stream.CanSeek)
                throw new RefusalException(path, "this is a pipe or a device", "a file on disk, since inputs are read more than once",
                    "Write the data to a file first.");
            if (stream.Length == 0)
                throw new RefusalException(path, "the file is empty", "a header and at least one row");
            return stream;
        }
        catch
        {
            stream.Dispose();
            throw;
        }
    }

    /// <summary>The last part of a path, as it stands in messages that give a place inside the file.</summary>
    public static string ShortName(string path) => Path.GetFileName(path);

    /// <summary>The refusal for a file that the system does not open.</summary>
    internal static RefusalException Unopened(string path, Exception failure) => failure switch
    {
        FileNotFoundException => new RefusalException(path, "there is no such file", "a file to read", Meant(path), failure),
        DirectoryNotFoundException => new RefusalException(path, "there is no such folder", "a file to read",
            "Paths in a study file are relative to the study file.", failure),
        UnauthorizedAccessException => new RefusalException(path, "this user may not read it", "a file with read permission",
            "Ask its owner for access, or change its mode.", failure),
        _ => new RefusalException(path, $"it cannot be opened ({failure.Message})", "a file that can be read", "", failure),
    };

    private static string Meant(string path)
    {
        string? folder = Path.GetDirectoryName(Path.GetFullPath(path));
        if (folder is null || !Directory.Exists(folder)) return "";
        try
        {
            string? nearest = NearestName.Of(Path.GetFileName(path), Directory.EnumerateFiles(folder).Select(Path.GetFileName)!);
            return nearest is null ? "" : $"Did you mean '{nearest}'?";
        }
        catch (Exception failure) when (failure is IOException or UnauthorizedAccessException)
        {
            return ""; // A folder that may not be listed gives no suggestion; the refusal itself stands.
        }
    }
}
