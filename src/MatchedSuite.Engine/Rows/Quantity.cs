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

    /// <summary>Standard deviation of the reference samples, the unit of estimates per standard deviation.</summary>
    ReferenceSd,

    /// <summary>Log-likelihood at the maximum.</summary>
    LogLikelihood,

    /// <summary>Log-likelihood of the covariates alone, without the endpoint.</summary>
    LogLikelihoodWithout,

    /// <summary>Likelihood-ratio statistic of the endpoint given the covariates, one degree of freedom.</summary>
    LikelihoodRatio,

    /// <summary>Its p-value.</summary>
    LikelihoodRatioP,

    /// <summary>Decimal logarithm of that.</summary>
    LikelihoodRatioLog10P,

    /// <summary>Score statistic of the endpoint given the covariates, one degree of freedom.</summary>
    Score,

    /// <summary>Its p-value.</summary>
    ScoreP,

    /// <summary>Decimal logarithm of that.</summary>
    ScoreLog10P,

    /// <summary>Lower profile-likelihood limit of the estimate.</summary>
    ProfileLow,

    /// <summary>Upper profile-likelihood limit of the estimate.</summary>
    ProfileHigh,

    /// <summary>Likelihood-ratio statistic of the levels of an ordinal endpoint as categories.</summary>
    CategoriesLikelihoodRatio,

    /// <summary>Its degrees of freedom.</summary>
    CategoriesDf,

    /// <summary>Its p-value.</summary>
    CategoriesP,

    /// <summary>Decimal logarithm of that.</summary>
    CategoriesLog10P,
}
