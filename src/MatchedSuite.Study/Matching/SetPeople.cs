namespace MatchedSuite.Study.Matching;

/// <summary>The people of one set by role, each known by the rows of their samples.</summary>
/// <param name="Set">Name of the set.</param>
/// <param name="Index">The people in the index role.</param>
/// <param name="Reference">The people in the reference role.</param>
internal sealed record SetPeople(string Set, IReadOnlyList<IReadOnlyList<int>> Index, IReadOnlyList<IReadOnlyList<int>> Reference)
{
    /// <summary>All people, index role first.</summary>
    public IEnumerable<IReadOnlyList<int>> Everyone => Index.Concat(Reference);
}
