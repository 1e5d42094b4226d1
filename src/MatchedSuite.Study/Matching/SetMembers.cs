namespace MatchedSuite.Study.Matching;

/// <summary>The rows of one set that stand in its two roles, in sheet order.</summary>
/// <param name="Set">Name of the set.</param>
internal sealed record SetMembers(string Set)
{
    /// <summary>Rows in the index role.</summary>
    public List<int> Index { get; } = [];

    /// <summary>Rows in the reference role.</summary>
    public List<int> Reference { get; } = [];

    /// <summary>All rows.</summary>
    public IEnumerable<int> Rows => Index.Concat(Reference);

    /// <summary>True where both roles have a sample.</summary>
    public bool Complete => Index.Count > 0 && Reference.Count > 0;
}
