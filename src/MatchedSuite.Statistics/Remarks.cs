namespace MatchedSuite.Statistics;

/// <summary>What a reader of one result must know beside its numbers. Each has a code in the column <c>flags</c>.</summary>
[Flags]
public enum Remarks : long
{
    /// <summary>Nothing to remark.</summary>
    None = 0,

    /// <summary>Some non-zero differences tie; ranks are midranks.</summary>
    Ties = 1 << 0,

    /// <summary>Some differences are zero.</summary>
    Zeros = 1 << 1,

    /// <summary>Every difference is the same; no test was made.</summary>
    NoVariation = 1 << 2,

    /// <summary>The null distribution was enumerated, not approximated.</summary>
    Exact = 1 << 3,

    /// <summary>The interval reaches the end of what the data can say: the sample is too small for the confidence asked.</summary>
    WideAsData = 1 << 4,

    /// <summary>A limit is infinite because one discordant count is zero.</summary>
    OneSidedDiscordance = 1 << 5,

    /// <summary>Fewer usable sets than needed; no test was made.</summary>
    TooFewSets = 1 << 6,

    /// <summary>No difference points anywhere: all are zero, or no pair is discordant; no test was made.</summary>
    NothingDiffers = 1 << 7,

    /// <summary>Some values could not be transformed (logarithm of zero or less) and were taken as missing.</summary>
    TransformUndefined = 1 << 8,

    /// <summary>The smallest p-value this design can give is above what the first step of an adjustment needs.</summary>
    OutOfReach = 1 << 9,

    /// <summary>More sets lack the endpoint's value than the study allows; no test was made.</summary>
    TooManyMissing = 1 << 10,

    /// <summary>The endpoint, or a covariate, separates the roles: the likelihood rises without end, so an end of the interval is infinite.</summary>
    Separated = 1 << 11,

    /// <summary>A covariate is constant within every set or follows from the other covariates; it was left out.</summary>
    CollinearCovariate = 1 << 12,

    /// <summary>The covariates determine the endpoint or the roles, or say the same as each other or the design; no test was made.</summary>
    Collinear = 1 << 13,

    /// <summary>The likelihood could not be maximised to the accuracy that is promised and no test was made, or an end of the interval was not found.</summary>
    NotConverged = 1 << 14,

    /// <summary>The null distribution was sampled by random relabelings or sign flips.</summary>
    Resampled = 1 << 15,

    /// <summary>The method does not adjust for covariates; the result is unadjusted although covariates were given.</summary>
    Unadjusted = 1 << 16,

    /// <summary>The variance between subjects is estimated as 0, the end of its range; the subjects' values are then as good as independent.</summary>
    SingularFit = 1 << 17,

    /// <summary>The method has no direction; its p-value is two-sided whatever was asked for.</summary>
    TwoSidedOnly = 1 << 18,

    /// <summary>A limit is infinite because one role has no events.</summary>
    EventsInOneRole = 1 << 19,

    /// <summary>Fewer endpoints than the fit of the common variance needs; no test was made.</summary>
    TooFewEndpoints = 1 << 20,

    /// <summary>More than half of the endpoint's values lie below its detection limit.</summary>
    MostlyBelowLimit = 1 << 21,

    /// <summary>More distinct codes than an ordinal endpoint may have; no test was made.</summary>
    TooManyCategories = 1 << 22,

    /// <summary>Some people serve in several sets, so that the sets are not independent.</summary>
    ReusedControls = 1 << 23,

    /// <summary>The reference values do not vary, so no estimate can be given per their standard deviation; no test was made.</summary>
    NoReferenceSpread = 1 << 24,
}
