namespace MatchedSuite.Study.Definition;

/// <summary>The study file's section <c>gates</c>: when the data are refused. Shares are in [0, 1]; null asks nothing.</summary>
public sealed record GateSection
{
    /// <summary>Largest share of samples of interest that may end without a complete set.</summary>
    public double? UnmatchedAtMost { get; init; }

    /// <summary>What happens to a set that breaks a promise of the matching.</summary>
    public Tolerance Tolerance { get; init; } = Tolerance.Report;

    /// <summary>Largest share of sets an endpoint may miss; beyond it the endpoint is listed as untested.</summary>
    public double? MissingAtMost { get; init; }
}
