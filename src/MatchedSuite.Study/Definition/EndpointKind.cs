namespace MatchedSuite.Study.Definition;

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
