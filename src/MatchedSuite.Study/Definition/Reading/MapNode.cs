namespace MatchedSuite.Study.Definition.Reading;

/// <summary>Keys with their values.</summary>
/// <param name="Entries">The keys in order, each once.</param>
/// <param name="Line">Line, from 1.</param>
/// <param name="Column">Column, from 1.</param>
internal sealed record MapNode(IReadOnlyList<(ScalarNode Key, Node Value)> Entries, long Line, long Column) : Node(Line, Column)
{
    /// <inheritdoc/>
    public override string Description => "keys with values";

    /// <summary>The entry of a key; null when it is not written.</summary>
    public (ScalarNode Key, Node Value)? Find(string key)
    {
        foreach (var entry in Entries)
        {
            if (entry.Key.Text == key)
                return entry;
        }

        return null;
    }
}
