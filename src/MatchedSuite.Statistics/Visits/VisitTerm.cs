namespace MatchedSuite.Statistics.Visits;

/// <summary>How a model describes the course over the visits.</summary>
public enum VisitTerm
{
    /// <summary>One mean a visit, free of each other.</summary>
    Means,

    /// <summary>A straight line in the times of the visits: level and slope.</summary>
    Line,
}
