namespace MatchedSuite.Study.Definition;

/// <summary>A column whose cells name visits or periods, in a fixed order.</summary>
/// <param name="Column">Name of the column.</param>
/// <param name="Order">Cell texts in order of time.</param>
/// <param name="Reference">Cell text of the reference; null takes the first.</param>
public sealed record OrderedGroups(string Column, IReadOnlyList<string> Order, string? Reference)
{
    /// <summary>Position of the reference in <see cref="Order"/>.</summary>
    public int ReferencePosition => Reference is null ? 0 : Order.ToList().IndexOf(Reference);

    /// <summary>Days on which the visits should have taken place; null asks nothing.</summary>
    public VisitWindow? Window { get; init; }
}
