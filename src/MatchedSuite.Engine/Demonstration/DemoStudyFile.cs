using System.Reflection;

namespace MatchedSuite.Engine.Demonstration;

/// <summary>The study files of the demos: kept under configs/demo, carried inside the program.</summary>
internal static class DemoStudyFile
{
    /// <summary>Writes <c>study.yaml</c> of a demo into a folder.</summary>
    /// <returns>Its path.</returns>
    public static string Write(string demo, string folder)
    {
        string name = $"demo.{demo}.yaml";
        using Stream text = Assembly.GetExecutingAssembly().GetManifestResourceStream(name)
            ?? throw new InvalidOperationException($"The program carries no {name}.");
        string path = Path.Combine(folder, "study.yaml");
        using FileStream file = File.Create(path);
        text.CopyTo(file);
        return path;
    }
}
