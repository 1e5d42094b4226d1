namespace MatchedSuite.EndToEnd.Tests.Program;

/// <summary>A folder of its own for one test's study; gone afterwards.</summary>
internal sealed class StudyFolder : IDisposable
{
    public StudyFolder() => Path = Directory.CreateTempSubdirectory("matched-test-").FullName;

    /// <summary>Full path.</summary>
    public string Path { get; }

    /// <summary>A copy of a folder below Inputs.</summary>
    public static StudyFolder Of(string input)
    {
        var folder = new StudyFolder();
        foreach (string file in Directory.EnumerateFiles(System.IO.Path.Combine(AppContext.BaseDirectory, "Inputs", input)))
            File.Copy(file, folder.At(System.IO.Path.GetFileName(file)));
        return folder;
    }

    /// <summary>A small sound study of eight pairs and four endpoints, to be broken by tests.</summary>
    public static StudyFolder Small()
    {
        var folder = new StudyFolder();
        folder.Write("study.yaml", SmallStudy.Study);
        folder.Write("samples.csv", SmallStudy.Samples);
        folder.Write("panel.csv", SmallStudy.Panel);
        return folder;
    }

    /// <summary>Full path of a file or folder inside.</summary>
    public string At(string name) => System.IO.Path.Combine(Path, name);

    /// <summary>Writes a file.</summary>
    public void Write(string name, string text) => File.WriteAllText(At(name), text);

    /// <summary>Reads a file.</summary>
    public string Read(string name) => File.ReadAllText(At(name));

    /// <summary>Changes a file's text; the part to replace must be there.</summary>
    public void Change(string name, string found, string replacement)
    {
        string text = Read(name);
        Assert.Contains(found, text, StringComparison.Ordinal);
        Write(name, text.Replace(found, replacement, StringComparison.Ordinal));
    }

    /// <summary>Runs the program in this folder.</summary>
    public Finished Run(params string[] arguments) => MatchedProgram.Run(Path, arguments);

    /// <summary>The results as the program wrote them to <c>results.csv</c>.</summary>
    public ResultsTable Results(string folder = "results") => ResultsTable.Read(At($"{folder}/results.csv"));

    /// <inheritdoc/>
    public void Dispose()
    {
        foreach (string folder in Directory.EnumerateDirectories(Path, "*", SearchOption.AllDirectories))
        {
            if (!OperatingSystem.IsWindows())
                File.SetUnixFileMode(folder, UnixFileMode.UserRead | UnixFileMode.UserWrite | UnixFileMode.UserExecute);
        }

        Directory.Delete(Path, recursive: true);
    }
}
