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

    /// <summary>Greenhouse and Geisser's ε of the visits.</summary>
    GreenhouseGeisserEpsilon,

    /// <summary>Huynh and Feldt's ε of the visits, not cut at 1.</summary>
    HuynhFeldtEpsilon,

    /// <summary>Mauchly's W: 1 where all differences between visits have one variance.</summary>
    MauchlyW,

    /// <summary>Its p-value.</summary>
    MauchlyP,

    /// <summary>Kendall's W: agreement of the subjects on the order of the visits.</summary>
    KendallW,

    /// <summary>Iman and Davenport's F of Friedman's test.</summary>
    ImanDavenportF,

    /// <summary>Its p-value.</summary>
    ImanDavenportP,

    /// <summary>Page's L as a standard normal deviate.</summary>
    PageZ,

    /// <summary>Mixed model: variance between subjects.</summary>
    VarianceBetween,

    /// <summary>Mixed model: variance within subjects.</summary>
    VarianceWithin,

    /// <summary>Mean of the index arm at the reference visit.</summary>
    BaselineIndexMean,

    /// <summary>Its standard deviation.</summary>
    BaselineIndexSd,

    /// <summary>Mean of the reference arm at the reference visit.</summary>
    BaselineReferenceMean,

    /// <summary>Its standard deviation.</summary>
    BaselineReferenceSd,

    /// <summary>Difference of these means over the root mean square of the two standard deviations.</summary>
    BaselineStandardisedDifference,

    /// <summary>Analysis of covariance: follow-up per unit of baseline within arms.</summary>
    BaselineSlope,

    /// <summary>Crossover: second period minus first.</summary>
    PeriodEffect,

    /// <summary>Its lower confidence limit.</summary>
    PeriodEffectLow,

    /// <summary>Its upper confidence limit.</summary>
    PeriodEffectHigh,

    /// <summary>Its t.</summary>
    PeriodT,

    /// <summary>Its p-value.</summary>
    PeriodP,

    /// <summary>Crossover: difference of the subjects' totals between the sequences.</summary>
    CarryOver,

    /// <summary>Its t.</summary>
    CarryOverT,

    /// <summary>Its p-value; no analysis should be chosen by it.</summary>
    CarryOverP,

    /// <summary>Lower limit of the standardised mean difference, by the noncentral t.</summary>
    EffectSizeLow,

    /// <summary>Upper limit of the standardised mean difference, by the noncentral t.</summary>
    EffectSizeHigh,
}
