namespace MatchedSuite.Study.Definition;

/// <summary>A study file, read and checked: everything the user decided.</summary>
public sealed record StudyDefinition
{
    /// <summary>Full path of the study file; paths inside it are relative to its folder.</summary>
    public required string Path { get; init; }

    /// <summary>The file's text as read, for the manifest.</summary>
    public required string Text { get; init; }

    /// <summary>What the version that read the file can do; the endpoint dictionary is held against it too.</summary>
    public Capabilities Available { get; init; } = Capabilities.Everything;

    /// <summary>Name of the study.</summary>
    public required string Name { get; init; }

    /// <summary>The question the study asks, printed with the results; may be null.</summary>
    public string? Question { get; init; }

    /// <summary>Every random step derives from it.</summary>
    public long Seed { get; init; } = 1;

    /// <summary>Where the tables are and how they are written.</summary>
    public required DataSection Data { get; init; }

    /// <summary>How people are linked.</summary>
    public required DesignSection Design { get; init; }

    /// <summary>What is measured.</summary>
    public EndpointSection Endpoints { get; init; } = new();

    /// <summary>What is computed.</summary>
    public AnalysisSection Analysis { get; init; } = new();

    /// <summary>When the data are refused.</summary>
    public GateSection Gates { get; init; } = new();

    /// <summary>What is written.</summary>
    public required OutputSection Output { get; init; }
}
