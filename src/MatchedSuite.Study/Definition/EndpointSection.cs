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

/// <summary>Kind of an endpoint; it decides which methods apply.</summary>
public enum EndpointKind
{
    /// <summary>Measured on a scale with differences.</summary>
    Continuous,

    /// <summary>Yes (1) or no (0).</summary>
    Binary,

    /// <summary>Ordered categories as integer codes.</summary>
    Ordinal,

    /// <summary>Number of events.</summary>
    Count,
}

/// <summary>Transform from the measured to the analysis scale.</summary>
public enum Transform
{
    /// <summary>As measured.</summary>
    None,

    /// <summary>Natural logarithm.</summary>
    Log,

    /// <summary>Logarithm to base 2.</summary>
    Log2,

    /// <summary>Logarithm to base 10.</summary>
    Log10,

    /// <summary>Square root.</summary>
    Sqrt,

    /// <summary>Normal scores of the midranks over all used samples (Blom).</summary>
    RankNormal,
}

/// <summary>What stands for a value below its detection limit.</summary>
public enum BelowLimit
{
    /// <summary>Half the limit.</summary>
    Half,

    /// <summary>The limit divided by the square root of two.</summary>
    Root2,

    /// <summary>The limit.</summary>
    Limit,

    /// <summary>The value is missing.</summary>
    Missing,
}
