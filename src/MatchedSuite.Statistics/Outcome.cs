namespace MatchedSuite.Statistics;

/// <summary>Whether a method could be computed, and if not, why not.</summary>
public enum Outcome
{
    /// <summary>The method was computed; statistic and p-value are there.</summary>
    Tested,

    /// <summary>Fewer complete sets than the method, or the study, needs.</summary>
    TooFewSets,

    /// <summary>Every difference is the same: there is no spread to measure the mean against.</summary>
    NoVariation,

    /// <summary>Every difference is zero, or no pair is discordant: the data say nothing about a direction.</summary>
    NothingDiffers,

    /// <summary>More sets lack the endpoint's value than the study allows.</summary>
    TooManyMissing,

    /// <summary>
    /// The covariates determine the endpoint, or the roles, within every set, or say the same as each other or the design: shares
    /// cannot be told apart.
    /// </summary>
    Collinear,

    /// <summary>The likelihood could not be maximised to the accuracy that is promised.</summary>
    NotConverged,

    /// <summary>Fewer endpoints than the method needs to learn what they have in common.</summary>
    TooFewEndpoints,

    /// <summary>More distinct codes than an ordinal endpoint may have: it is measured, not graded.</summary>
    TooManyCategories,

    /// <summary>The reference values do not vary, so no estimate can be given per their standard deviation.</summary>
    NoReferenceSpread,
}
