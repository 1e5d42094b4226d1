using MatchedSuite.Storage;

namespace MatchedSuite.Engine.Output;

/// <summary>The folder of a run: claimed by a lock, filled beside its place, and put there whole or not at all.</summary>
/// <remarks>
/// For a target <c>out</c> the files <c>.out.lock</c>, <c>.out.partial</c> and <c>.out.previous</c> stand beside it while a run
/// goes on. An earlier run that was stopped while it swapped folders is put right by the next claim.
/// </remarks>
public sealed class RunFolder : IDisposable
{
    private const string Manifest = "run.json";
    private readonly FileStream _lock;
    private readonly string _previous;
    private bool _committed;

    private RunFolder(string target, string partial, string previous, FileStream @lock)
    {
        Target = target;
        Partial = partial;
        _previous = previous;
        _lock = @lock;
    }

    /// <summary>Where the run appears in the end.</summary>
    public string Target { get; }

    /// <summary>Where files are written until then.</summary>
    public string Partial { get; }

    /// <summary>Takes the folder for one run.</summary>
    /// <param name="target">Full path of the folder.</param>
    /// <param name="replace">True where an earlier run there may be replaced.</param>
    /// <exception cref="FolderBusyException">Another run holds the folder.</exception>
    /// <exception cref="RefusalException">The folder cannot be written, holds other files, or must not be replaced.</exception>
    public static RunFolder Claim(string target, bool replace)
    {
        string full = Path.TrimEndingDirectorySeparator(Path.GetFullPath(target));
        string parent = Path.GetDirectoryName(full)
            ?? throw new RefusalException(full, "it is the root of the file system", "a folder below it", "Choose another output folder.");
        string Beside(string suffix) => Path.Combine(parent, $".{Path.GetFileName(full)}.{suffix}");
        FileStream @lock = Lock(parent, Beside("lock"), full);
        try
        {
            var folder = new RunFolder(full, Beside("partial"), Beside("previous"), @lock);
            folder.PutRight();
            folder.RefuseForeign(replace);
            Directory.CreateDirectory(folder.Partial);
            return folder;
        }
        catch (Exception error)
        {
            @lock.Dispose();
            throw error is UnauthorizedAccessException or IOException ? Unwritable(full, error) : error;
        }
    }

    /// <summary>A path inside the folder being filled; its parent folder exists.</summary>
    public string PathOf(string relative)
    {
        string path = Path.Combine(Partial, relative);
        Directory.CreateDirectory(Path.GetDirectoryName(path)!);
        return path;
    }

    /// <summary>Puts the filled folder in its place; the earlier run, if any, is gone afterwards.</summary>
    public void Commit()
    {
        if (Directory.Exists(Target))
            Directory.Move(Target, _previous);
        Directory.Move(Partial, Target);
        _committed = true;
        if (Directory.Exists(_previous))
            Directory.Delete(_previous, recursive: true);
    }

    /// <summary>Gives the folder free; without a commit nothing of the run is left.</summary>
    public void Dispose()
    {
        if (!_committed && Directory.Exists(Partial))
            Directory.Delete(Partial, recursive: true);
        _lock.Dispose();
    }

    private static FileStream Lock(string parent, string path, string target)
    {
        try
        {
            Directory.CreateDirectory(parent);
        }
        catch (Exception error) when (error is UnauthorizedAccessException or IOException)
        {
            throw Unwritable(target, error);
        }

        try
        {
            return new FileStream(
                path, FileMode.OpenOrCreate, FileAccess.ReadWrite, FileShare.None, bufferSize: 1, FileOptions.DeleteOnClose);
        }
        catch (UnauthorizedAccessException error)
        {
            throw Unwritable(target, error);
        }
        catch (IOException error) when (File.Exists(path))
        {
            throw new FolderBusyException(target, error);
        }
        catch (IOException error)
        {
            throw Unwritable(target, error);
        }
    }

    private static RefusalException Unwritable(string target, Exception error) => new(
        target, "the output folder cannot be written", "a folder that this user may create and fill",
        "Change its permissions or choose another folder with output.folder or --out.", error);

    private void PutRight()
    {
        if (Directory.Exists(Partial))
            Directory.Delete(Partial, recursive: true);
        if (!Directory.Exists(_previous))
            return;
        if (Directory.Exists(Target))
            Directory.Delete(_previous, recursive: true);
        else
            Directory.Move(_previous, Target);
    }

    private void RefuseForeign(bool replace)
    {
        if (File.Exists(Target))
            throw new RefusalException(Target, "a file stands where the output folder should be", "a folder, or nothing", "Choose another folder.");
        if (!Directory.Exists(Target) || !Directory.EnumerateFileSystemEntries(Target).Any())
            return;
        if (!File.Exists(Path.Combine(Target, Manifest)))
        {
            throw new RefusalException(
                Target, $"the folder holds files but no {Manifest}, so it is no earlier run", "an empty folder, an earlier run, or nothing",
                "Choose another folder; files that are not ours are never deleted.");
        }

        if (!replace)
        {
            throw new RefusalException(
                Target, "an earlier run is there and output.overwrite is 'refuse'", "no earlier run",
                "Choose another folder, move the earlier run away, or set output.overwrite to 'replace'.");
        }
    }
}
