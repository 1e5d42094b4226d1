namespace MatchedSuite.Study.Definition;

/// <summary>What stands for a value below its detection limit.</summary>
public enum BelowLimit
{
    /// <summary>Half the limit.</summary>
    Half,

    /// <summary>The limit divided by the square root of two.</summary>
    Root2,

    /// <summary>The limit.</summary>
    Limit,

    /// <summary>The value is missing.</summary>
    Missing,
}
