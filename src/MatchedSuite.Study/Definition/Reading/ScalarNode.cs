namespace MatchedSuite.Study.Definition.Reading;

/// <summary>A single value, as the text written.</summary>
/// <param name="Text">The text, without quotes.</param>
/// <param name="Quoted">True where it stood in quotes or in a block, so that it is a text whatever it looks like.</param>
/// <param name="Line">Line, from 1.</param>
/// <param name="Column">Column, from 1.</param>
internal sealed record ScalarNode(string Text, bool Quoted, long Line, long Column) : Node(Line, Column)
{
    /// <summary>True where nothing is written, or the mark for nothing.</summary>
    public bool IsNull => !Quoted && (Text is "" or "~" or "null" or "Null" or "NULL");

    /// <inheritdoc/>
    public override string Description => IsNull ? "nothing" : $"the text '{Text}'";
}
