namespace MatchedSuite.Study.Definition;

/// <summary>A run replaces its results folder as a whole: with an input inside, it would delete what it reads.</summary>
public static class ResultsFolder
{
    /// <summary>The first of some files that lies inside a folder; null where none does.</summary>
    /// <param name="folder">Full path of the folder.</param>
    /// <param name="files">Full paths.</param>
    public static string? FirstInside(string folder, IEnumerable<string> files)
    {
        string prefix = Path.TrimEndingDirectorySeparator(folder) + Path.DirectorySeparatorChar;
        return files.FirstOrDefault(file => file.StartsWith(prefix, StringComparison.Ordinal));
    }
}
