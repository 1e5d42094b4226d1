namespace MatchedSuite.Study.Definition;

/// <summary>What the signed-rank test does with differences of zero.</summary>
public enum ZeroRule
{
    /// <summary>They are dropped before ranking.</summary>
    Drop,

    /// <summary>They are ranked, then dropped (Pratt).</summary>
    Pratt,
}
