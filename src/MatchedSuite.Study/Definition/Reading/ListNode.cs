namespace MatchedSuite.Study.Definition.Reading;

/// <summary>A list of values.</summary>
/// <param name="Items">Its entries, in order.</param>
/// <param name="Line">Line, from 1.</param>
/// <param name="Column">Column, from 1.</param>
internal sealed record ListNode(IReadOnlyList<Node> Items, long Line, long Column) : Node(Line, Column)
{
    /// <inheritdoc/>
    public override string Description => "a list";
}
