namespace MatchedSuite.Engine.Rows;

/// <summary>The numbers of <c>details.parquet</c>; each is written as its name in small letters with hyphens and described in docs/results.md.</summary>
public enum Quantity : short
{
    /// <summary>Index samples with a value below the detection limit.</summary>
    IndexBelowLimit,

    /// <summary>Reference samples with a value below the detection limit.</summary>
    ReferenceBelowLimit,

    /// <summary>Pairs in which both have the sign.</summary>
    PairsBoth,

    /// <summary>Pairs in which only the index sample has it.</summary>
    PairsIndexOnly,

    /// <summary>Pairs in which only the reference sample has it.</summary>
    PairsReferenceOnly,

    /// <summary>Pairs in which neither has it.</summary>
    PairsNeither,

    /// <summary>Difference of the proportions with the sign.</summary>
    RiskDifference,

    /// <summary>Its lower limit by Newcombe's square-and-add, method 10.</summary>
    RiskDifferenceLow,

    /// <summary>Its upper limit by Newcombe's square-and-add, method 10.</summary>
    RiskDifferenceHigh,

    /// <summary>Its lower limit by Tango's score statistic.</summary>
    RiskDifferenceScoreLow,

    /// <summary>Its upper limit by Tango's score statistic.</summary>
    RiskDifferenceScoreHigh,

    /// <summary>Intraclass correlation ICC(1,1) of the pairs.</summary>
    IntraclassCorrelation,

    /// <summary>Its exact lower limit.</summary>
    IntraclassCorrelationLow,

    /// <summary>Its exact upper limit.</summary>
    IntraclassCorrelationHigh,
}
