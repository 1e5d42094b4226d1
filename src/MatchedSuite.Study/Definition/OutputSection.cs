namespace MatchedSuite.Study.Definition;

/// <summary>The study file's section <c>output</c>: what is written.</summary>
public sealed record OutputSection
{
    /// <summary>Full path of the folder for the results.</summary>
    public required string Folder { get; init; }

    /// <summary>True where an earlier run in the folder may be replaced.</summary>
    public bool Replace { get; init; } = true;

    /// <summary>Whether a report is asked for; null where the study file does not say.</summary>
    public bool? Report { get; init; }

    /// <summary>Rows in the printed summary and the report's first table.</summary>
    public int Top { get; init; } = 25;

    /// <summary>True where identifiers of participants and sets may be shown in report and figures.</summary>
    public bool IdentifiersShown { get; init; }
}
