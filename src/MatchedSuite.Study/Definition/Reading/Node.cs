namespace MatchedSuite.Study.Definition.Reading;

/// <summary>A part of a study file with the place where it begins.</summary>
/// <param name="Line">Line, from 1.</param>
/// <param name="Column">Column, from 1.</param>
internal abstract record Node(long Line, long Column)
{
    /// <summary>What it is, for messages: 'a text', 'a list', 'a mapping'.</summary>
    public abstract string Description { get; }
}
