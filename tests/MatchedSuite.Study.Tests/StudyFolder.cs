using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Tests;

/// <summary>A folder for the files of one test, deleted afterwards.</summary>
internal sealed class StudyFolder : IDisposable
{
    public string Path { get; } = Directory.CreateTempSubdirectory("study-").FullName;

    /// <summary>Writes a file and gives its path.</summary>
    public string Write(string name, string text)
    {
        string path = System.IO.Path.Combine(Path, name);
        File.WriteAllText(path, text);
        return path;
    }

    /// <summary>Reads a study file with the whole language available.</summary>
    public static StudyDefinition Read(string text) => Read(text, Capabilities.Everything);

    /// <summary>Reads a study file.</summary>
    public static StudyDefinition Read(string text, Capabilities capabilities)
    {
        using var folder = new StudyFolder();
        return StudyReader.Read(folder.Write("study.yaml", text), capabilities);
    }

    /// <summary>The refusal of a study file.</summary>
    public static RefusalException Refusal(string text) => Refusal(text, Capabilities.Everything);

    /// <summary>The refusal of a study file.</summary>
    public static RefusalException Refusal(string text, Capabilities capabilities) =>
        Assert.Throws<RefusalException>(() => Read(text, capabilities));

    public void Dispose() => Directory.Delete(Path, recursive: true);
}
