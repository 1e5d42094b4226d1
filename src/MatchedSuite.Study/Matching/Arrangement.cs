namespace MatchedSuite.Study.Matching;

/// <summary>Which sample stands where in which set: computed once from the sample sheet, used for every endpoint.</summary>
public sealed record Arrangement
{
    /// <summary>The used rows of the sample sheet, ascending; a row of values is asked for in this order.</summary>
    public required int[] Rows { get; init; }

    /// <summary>Names of the sets (pairs, subjects), in order of first appearance in the sample sheet.</summary>
    public required string[] Sets { get; init; }

    /// <summary>Pairs: index, then reference. Visits: the visits in order.</summary>
    public required Place[] Places { get; init; }

    /// <summary>The strata, sorted ordinally; empty when the study has none.</summary>
    public string[] Strata { get; init; } = [];

    /// <summary>For each set the position of its stratum in <see cref="Strata"/>; empty when the study has none.</summary>
    public int[] StratumOfSet { get; init; } = [];
}
