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

    /// <summary>Endpoints of one block; null lets the engine choose by memory. Results do not depend on it.</summary>
    public int? EndpointsPerBlock { get; init; }

    /// <summary>The study as these options change it: folder and seed of the command line go before the file's.</summary>
    internal StudyDefinition Override(StudyDefinition study) => study with
    {
        Seed = Seed ?? study.Seed,
        Output = Folder is null ? study.Output : study.Output with { Folder = Path.GetFullPath(Folder) },
    };
}

/// <summary>What a warning does.</summary>
public enum WarningRule
{
    /// <summary>It is printed and recorded.</summary>
    Report,

    /// <summary>It refuses the data.</summary>
    Refuse,
}
