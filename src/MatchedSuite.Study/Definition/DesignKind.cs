namespace MatchedSuite.Study.Definition;

/// <summary>The kind of linkage.</summary>
public enum DesignKind
{
    /// <summary>Two samples a set, one index and one reference.</summary>
    Pairs,

    /// <summary>Cases with their controls, 1:1 to N:M.</summary>
    Sets,

    /// <summary>The same person at several visits.</summary>
    Visits,

    /// <summary>Change within persons, compared between arms.</summary>
    ChangeByArm,

    /// <summary>Two treatments in two orders.</summary>
    Crossover,
}
