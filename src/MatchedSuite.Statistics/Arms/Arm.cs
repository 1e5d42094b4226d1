namespace MatchedSuite.Statistics.Arms;

/// <summary>The two arms that a change is compared between.</summary>
public enum Arm
{
    /// <summary>The arm of interest; estimates are index minus reference.</summary>
    Index,

    /// <summary>The arm it is compared with.</summary>
    Reference,
}
