namespace MatchedSuite.Study.Definition;

/// <summary>What happens where several samples stand in one place of a set.</summary>
public enum Replicates
{
    /// <summary>The data are refused.</summary>
    Refuse,

    /// <summary>Their values are averaged.</summary>
    Mean,

    /// <summary>The first in the sample sheet is taken.</summary>
    First,
}
