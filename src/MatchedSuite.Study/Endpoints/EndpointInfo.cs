using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Endpoints;

/// <summary>What is known of one endpoint: from the dictionary where it has an entry, else from the study file.</summary>
public sealed record EndpointInfo
{
    /// <summary>Name in the data.</summary>
    public required string Name { get; init; }

    /// <summary>Name for people; null when there is none.</summary>
    public string? Label { get; init; }

    /// <summary>Kind; it decides which methods apply.</summary>
    public EndpointKind Kind { get; init; }

    /// <summary>Unit of the measured values; null when there is none.</summary>
    public string? Unit { get; init; }

    /// <summary>Transform to the analysis scale; none for every kind but continuous.</summary>
    public Transform Transform { get; init; }

    /// <summary>Detection limit in the endpoint's unit; null when there is none.</summary>
    public double? DetectionLimit { get; init; }

    /// <summary>Family for adjustment by family; "all" when there is none.</summary>
    public string Family { get; init; } = EndpointCatalogue.NoFamily;

    /// <summary>Weight for weighted adjustments, 0 or more; 1 when there is none.</summary>
    public double Weight { get; init; } = 1;

    /// <summary>Position of the endpoint in the dictionary, from 0: the order of tests that go one after the other; last of all where it has no entry.</summary>
    public int Place { get; init; } = int.MaxValue;

    /// <summary>True where the dictionary calls the endpoint primary.</summary>
    public bool Primary { get; init; }
}
