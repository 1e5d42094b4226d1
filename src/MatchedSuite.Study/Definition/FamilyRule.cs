namespace MatchedSuite.Study.Definition;

/// <summary>Over which hypotheses an adjustment runs.</summary>
public enum FamilyRule
{
    /// <summary>All hypotheses of one contrast and stratum together.</summary>
    All,

    /// <summary>Each family of endpoints by itself.</summary>
    ByFamily,

    /// <summary>Families first, then endpoints within the selected families.</summary>
    ByFamilyThenAll,
}
