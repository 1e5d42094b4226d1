namespace MatchedSuite.Study.Definition;

/// <summary>The study file's section <c>design</c>: how people are linked.</summary>
public sealed record DesignSection
{
    /// <summary>The kind of linkage.</summary>
    public required DesignKind Kind { get; init; }

    /// <summary>Pairs, sets: the column that links samples.</summary>
    public string? Set { get; init; }

    /// <summary>The column that names the person.</summary>
    public string? Subject { get; init; }

    /// <summary>Pairs, sets: which samples are index and which reference.</summary>
    public TwoGroups? Role { get; init; }

    /// <summary>Pairs: the column of a measured exposure, instead of a role.</summary>
    public string? Exposure { get; init; }

    /// <summary>Visits, change by arm: the visits in their order.</summary>
    public OrderedGroups? Visit { get; init; }

    /// <summary>Visits: which comparisons are made.</summary>
    public IReadOnlyList<VisitContrast> Contrasts { get; init; } = [VisitContrast.EachVsReference];

    /// <summary>Change by arm: which arm is index and which reference.</summary>
    public TwoGroups? Arm { get; init; }

    /// <summary>Crossover: the periods in their order.</summary>
    public OrderedGroups? Period { get; init; }

    /// <summary>Crossover: which treatment is index and which reference.</summary>
    public TwoGroups? Treatment { get; init; }

    /// <summary>The column whose values divide the sets; every result is also given within each.</summary>
    public string? Stratum { get; init; }

    /// <summary>What happens where several samples stand in one place of a set.</summary>
    public Replicates Replicates { get; init; } = Replicates.Refuse;

    /// <summary>Sets: whether one control may serve several cases.</summary>
    public bool ReuseAllowed { get; init; }

    /// <summary>What the matching promised.</summary>
    public IReadOnlyList<MatchRule> MatchOn { get; init; } = [];

    /// <summary>Columns adjusted for within sets.</summary>
    public IReadOnlyList<string> Covariates { get; init; } = [];

    /// <summary>Count endpoints: the column with the time a sample's person was observed; null when all are equal.</summary>
    public string? PersonTime { get; init; }
}
