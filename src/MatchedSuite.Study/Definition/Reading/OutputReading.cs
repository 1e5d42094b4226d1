namespace MatchedSuite.Study.Definition.Reading;

/// <summary>Reads the sections <c>gates</c> and <c>output</c>.</summary>
internal static class OutputReading
{
    private const string UsualFolder = "out";

    /// <summary>The gates; none where the section is not written.</summary>
    public static GateSection Gates(Section? section) =>
        section is null
            ? new GateSection()
            : new GateSection
            {
                UnmatchedAtMost = section.Share("unmatched-at-most"),
                Tolerance = section.Choice<Tolerance>("tolerance") ?? Tolerance.Report,
                MissingAtMost = section.Share("missing-at-most"),
            };

    /// <summary>The output; the folder is made full, relative to the study file's folder.</summary>
    /// <param name="root">The whole study file.</param>
    /// <param name="folder">Folder of the study file.</param>
    /// <param name="inputs">Full paths of all files the study reads.</param>
    public static OutputSection Output(Section root, string folder, IReadOnlyCollection<string> inputs)
    {
        Section? section = root.Inner("output");
        string target = Path.GetFullPath(section?.Text("folder", "the path of a folder") ?? UsualFolder, folder);
        RefuseFolderOfInputs(section ?? root, section is null ? "output" : "folder", target, inputs);
        var output = new OutputSection { Folder = target };
        if (section is null)
            return output;
        return output with
        {
            Replace = section.Named("overwrite", ["replace", "refuse"]) != "refuse",
            Report = section.IsTrue("report"),
            Top = (int)(section.Whole("top", 1, 100_000) ?? output.Top),
            IdentifiersShown = section.Named("identifiers", ["hidden", "shown"]) == "shown",
        };
    }

    private static void RefuseFolderOfInputs(Section section, string key, string target, IReadOnlyCollection<string> inputs)
    {
        if ((inputs.FirstOrDefault(input => input == target) ?? ResultsFolder.FirstInside(target, inputs)) is { } held)
            throw section.Refuse(key, $"the folder holds '{Path.GetFileName(held)}', which the study reads, and a run replaces the folder", "a folder of its own for the results", "Name another folder in output.folder.");
    }
}
