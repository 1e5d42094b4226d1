namespace MatchedSuite.Study.Matching;

/// <summary>Which sample stands where in which set: computed once from the sample sheet, used for every endpoint.</summary>
public sealed record Arrangement
{
    /// <summary>The used rows of the sample sheet, ascending; a row of values is asked for in this order. A sample that stands in several sets is one row.</summary>
    public required int[] Rows { get; init; }

    /// <summary>Names of the sets (pairs, subjects), in order of first appearance in the sample sheet.</summary>
    public required string[] Sets { get; init; }

    /// <summary>Pairs: index, then reference. Visits, periods: in order of time, with subjects who lack some. Matched sets have none.</summary>
    public required Place[] Places { get; init; }

    /// <summary>Matched sets: who stands in which set and role; null for other designs.</summary>
    public MemberLayout? Members { get; init; }

    /// <summary>Matched sets: how many people stand in several sets.</summary>
    public int PeopleInSeveralSets { get; init; }

    /// <summary>The strata, sorted ordinally; empty when the study has none.</summary>
    public string[] Strata { get; init; } = [];

    /// <summary>Change by arm: 0 for subjects of the index arm, 1 of the reference arm; crossover: 0 for those with the index treatment first, 1 for the others; else empty.</summary>
    public int[] GroupOfSet { get; init; } = [];

    /// <summary>For each set the position of its stratum in <see cref="Strata"/>; empty when the study has none.</summary>
    public int[] StratumOfSet { get; init; } = [];
}
