namespace MatchedSuite.Study.Definition;

/// <summary>What happens to a set that breaks a promise of the matching.</summary>
public enum Tolerance
{
    /// <summary>It is used and listed.</summary>
    Report,

    /// <summary>It is left out and listed.</summary>
    Drop,

    /// <summary>The run is refused.</summary>
    Refuse,
}
