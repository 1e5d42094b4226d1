namespace MatchedSuite.Engine.Tests;

/// <summary>Files of the repository, for tests that hold documents and code against each other.</summary>
internal static class Repository
{
    private static readonly string Root = FindRoot();

    /// <summary>Full path of a file in the repository.</summary>
    public static string Path(string relative) => System.IO.Path.Combine(Root, relative);

    private static string FindRoot()
    {
        DirectoryInfo? folder = new(AppContext.BaseDirectory);
        while (folder is not null && !File.Exists(System.IO.Path.Combine(folder.FullName, "MatchedSuite.sln")))
            folder = folder.Parent;
        return folder?.FullName ?? throw new InvalidOperationException("The tests run outside the repository.");
    }
}
