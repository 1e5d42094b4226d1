using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Running;

/// <summary>What the command line decides about a run; nothing of it but the seed changes a number in the results.</summary>
public sealed record RunOptions
{
    /// <summary>Output folder instead of the study file's; null keeps that.</summary>
    public string? Folder { get; init; }

    /// <summary>Threads that read and compute.</summary>
    public int Threads { get; init; } = Environment.ProcessorCount;

    /// <summary>Seed instead of the study file's; null keeps that.</summary>
    public long? Seed { get; init; }

    /// <summary>Upper bound in bytes for the values held in memory.</summary>
    public long Memory { get; init; } = 1L << 30;

    /// <summary>
    /// The part of the memory that differences for adjustments by sign flips may take: a quarter, beside a half for values to be
    /// reordered and a quarter for the blocks under way.
    /// </summary>
    internal long MemoryForDifferences => Memory / 4;

    /// <summary>What a warning does.</summary>
    public WarningRule Warnings { get; init; } = WarningRule.Report;

    /// <summary>Whether a report is asked for, instead of the study file's word; null keeps that.</summary>
    public bool? Report { get; init; }

    /// <summary>Endpoints of one block; null lets the engine choose by memory. Results do not depend on it.</summary>
    public int? EndpointsPerBlock { get; init; }

    /// <summary>The study as these options change it: folder and seed of the command line go before the file's.</summary>
    /// <exception cref="RefusalException">The folder of the command line holds the study file or one of its inputs.</exception>
    internal StudyDefinition Override(StudyDefinition study)
    {
        if (Folder is not null)
            RefuseFolderOfInputs(Path.GetFullPath(Folder), study);
        return study with
        {
            Seed = Seed ?? study.Seed,
            Output = study.Output with
            {
                Folder = Folder is null ? study.Output.Folder : Path.GetFullPath(Folder),
                Report = Report ?? study.Output.Report,
            },
        };
    }

    private static void RefuseFolderOfInputs(string folder, StudyDefinition study)
    {
        if (ResultsFolder.FirstInside(folder, StudyInputs.FilesOf(study).Select(input => input.Path).Append(study.Path)) is not { } file)
            return;
        throw new RefusalException(
            "--out", $"the folder {folder} holds '{Path.GetFileName(file)}', which the run reads, and a run replaces the folder",
            "a folder of its own for the results", "Name another folder.");
    }
}

/// <summary>What a warning does.</summary>
public enum WarningRule
{
    /// <summary>It is printed and recorded.</summary>
    Report,

    /// <summary>It refuses the data.</summary>
    Refuse,
}
