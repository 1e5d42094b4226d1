namespace MatchedSuite.Study.Matching;

/// <summary>The members of matched sets, set after set, those in the index role first within a set.</summary>
public sealed record MemberLayout
{
    /// <summary>Where each set starts among the members, then the number of members.</summary>
    public required int[] Starts { get; init; }

    /// <summary>True for a member in the index role.</summary>
    public required bool[] IsIndex { get; init; }

    /// <summary>Takes an endpoint's values from its row, one a member; several samples of a person are averaged.</summary>
    public required Place Values { get; init; }

    /// <summary>Rows of the sample sheet, member after member; a sample used in several sets stands here several times.</summary>
    public required int[] SheetRows { get; init; }

    /// <summary>Takes a column's numbers, one for each of <see cref="SheetRows"/>, to one a member.</summary>
    public required Place Cells { get; init; }

    /// <summary>Number of members.</summary>
    public int Count => IsIndex.Length;
}
