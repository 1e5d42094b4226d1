namespace MatchedSuite.Study.Definition;

/// <summary>The study file's section <c>endpoints</c>: what is measured.</summary>
public sealed record EndpointSection
{
    /// <summary>Full path of the dictionary of endpoints; null when there is none.</summary>
    public string? Dictionary { get; init; }

    /// <summary>Names or * patterns of the endpoints to analyse.</summary>
    public IReadOnlyList<string> Include { get; init; } = ["*"];

    /// <summary>Names or * patterns to leave out.</summary>
    public IReadOnlyList<string> Exclude { get; init; } = [];

    /// <summary>Kind of an endpoint without one in the dictionary.</summary>
    public EndpointKind Kind { get; init; } = EndpointKind.Continuous;

    /// <summary>Transform of an endpoint without one in the dictionary.</summary>
    public Transform Transform { get; init; } = Transform.None;

    /// <summary>What stands for a value below its detection limit.</summary>
    public BelowLimit BelowLimit { get; init; } = BelowLimit.Half;

    /// <summary>True where estimates are given per standard deviation of the reference samples.</summary>
    public bool PerStandardDeviation { get; init; }
}
