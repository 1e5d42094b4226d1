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

/// <summary>The kind of linkage.</summary>
public enum DesignKind
{
    /// <summary>Two samples a set, one index and one reference.</summary>
    Pairs,

    /// <summary>Cases with their controls, 1:1 to N:M.</summary>
    Sets,

    /// <summary>The same person at several visits.</summary>
    Visits,

    /// <summary>Change within persons, compared between arms.</summary>
    ChangeByArm,

    /// <summary>Two treatments in two orders.</summary>
    Crossover,
}

/// <summary>What happens where several samples stand in one place of a set.</summary>
public enum Replicates
{
    /// <summary>The data are refused.</summary>
    Refuse,

    /// <summary>Their values are averaged.</summary>
    Mean,

    /// <summary>The first in the sample sheet is taken.</summary>
    First,
}

/// <summary>Comparisons between visits.</summary>
public enum VisitContrast
{
    /// <summary>Every visit with the reference visit.</summary>
    EachVsReference,

    /// <summary>Every visit with the one before it.</summary>
    Successive,

    /// <summary>A trend over the visits.</summary>
    Trend,

    /// <summary>Any difference at all.</summary>
    Omnibus,
}

/// <summary>A column whose cells say which of two groups a sample belongs to; other cells are of no interest.</summary>
/// <param name="Column">Name of the column.</param>
/// <param name="Index">Cell text of the index group.</param>
/// <param name="Reference">Cell text of the reference group.</param>
public sealed record TwoGroups(string Column, string Index, string Reference);

/// <summary>A column whose cells name visits or periods, in a fixed order.</summary>
/// <param name="Column">Name of the column.</param>
/// <param name="Order">Cell texts in order of time.</param>
/// <param name="Reference">Cell text of the reference; null takes the first.</param>
public sealed record OrderedGroups(string Column, IReadOnlyList<string> Order, string? Reference);

/// <summary>One promise of the matching, audited set by set.</summary>
/// <param name="Column">Name of the column.</param>
/// <param name="Within">Largest difference allowed within a set; null when equality is asked.</param>
public sealed record MatchRule(string Column, double? Within);
