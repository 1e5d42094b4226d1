namespace MatchedSuite.Study.Definition;

/// <summary>Comparisons between visits.</summary>
public enum VisitContrast
{
    /// <summary>Every visit with the reference visit.</summary>
    EachVsReference,

    /// <summary>Every visit with the one before it.</summary>
    Successive,

    /// <summary>A trend over the visits.</summary>
    Trend,

    /// <summary>Any difference at all.</summary>
    Omnibus,
}
