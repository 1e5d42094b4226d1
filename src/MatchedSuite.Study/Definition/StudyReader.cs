using System.Text;
using MatchedSuite.Storage;
using MatchedSuite.Study.Definition.Reading;

namespace MatchedSuite.Study.Definition;

/// <summary>Reads a study file strictly: what is not understood is refused, never ignored.</summary>
/// <remarks>Every key is described in docs/study-file.md; the published schema is configs/schema/study.schema.json.</remarks>
public static class StudyReader
{
    // A study file is written by hand; a larger file is the wrong file, most likely a table.
    private const long LargestFile = 4 << 20;

    private static readonly UTF8Encoding StrictUtf8 = new(encoderShouldEmitUTF8Identifier: false, throwOnInvalidBytes: true);

    /// <summary>Reads and checks a study file. The tables it names are not opened.</summary>
    /// <param name="path">Path of the study file.</param>
    /// <param name="available">What this version can do.</param>
    /// <exception cref="RefusalException">The file cannot be read, or says something unknown, impossible or not available; names line, column and key.</exception>
    public static StudyDefinition Read(string path, Capabilities available)
    {
        string full = Path.GetFullPath(path);
        string file = Path.GetFileName(full);
        string folder = Path.GetDirectoryName(full) ?? full;
        string text = ReadText(path, full);
        Section root = Section.Root(file, NodeTree.Parse(text, file));
        Version(root);
        Section study = root.RequiredInner("study");
        DesignSection design = DesignReading.Read(root.RequiredInner("design"), available);
        Capabilities ofDesign = available.For(design.Kind);
        var definition = new StudyDefinition
        {
            Path = full,
            Text = text,
            Available = available,
            Name = study.RequiredText("name", "the name of the study"),
            Question = study.Text("question", "the question the study asks"),
            Seed = study.Whole("seed", 0, long.MaxValue) ?? 1,
            Data = DataReading.Read(root.RequiredInner("data"), folder, available),
            Design = design,
            Endpoints = EndpointsReading.Read(root.Inner("endpoints"), folder, ofDesign),
            Gates = OutputReading.Gates(root.Inner("gates")),
            Output = new OutputSection { Folder = folder },
        };
        definition = definition with
        {
            Analysis = AnalysisReading.Read(root.Inner("analysis"), design, ofDesign),
            Output = OutputReading.Output(root, folder, [.. Inputs(definition)]),
        };
        StudyRules.Check(root, definition);
        return definition;
    }

    private static void Version(Section root)
    {
        const string Expected = "1, the version of the study file that is described in docs/study-file.md";
        if ((root.Whole("schema", 1, long.MaxValue) ?? throw root.Absent("schema", Expected, "Write schema: 1 as the first line.")) != 1)
            throw root.Refuse("schema", "this version of the study file is not known", Expected);
    }

    private static IEnumerable<string> Inputs(StudyDefinition study) =>
        new[] { study.Path, study.Data.Samples, study.Data.Values, study.Endpoints.Dictionary }.OfType<string>();

    private static string ReadText(string path, string full)
    {
        if (Directory.Exists(full))
            throw new RefusalException(path, "this is a folder", "a study file (YAML)", "Name the file in it.");
        if (!File.Exists(full))
            throw new RefusalException(path, "there is no such file", "a study file (YAML)", "Check the path; it is relative to the folder in which the command runs.");
        try
        {
            if (new FileInfo(full).Length > LargestFile)
                throw new RefusalException(path, "the file is larger than 4 MiB", "a study file (YAML), not a table");
            using var reader = new StreamReader(full, StrictUtf8, detectEncodingFromByteOrderMarks: true);
            return reader.ReadToEnd();
        }
        catch (DecoderFallbackException error)
        {
            throw new RefusalException(path, "the file is not UTF-8 text", "a study file in the encoding UTF-8", "Save it again as UTF-8.", error);
        }
        catch (Exception error) when (error is IOException or UnauthorizedAccessException)
        {
            throw new RefusalException(path, $"the file cannot be read ({error.Message.TrimEnd('.')})", "a readable study file", "", error);
        }
    }
}
