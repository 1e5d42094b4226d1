namespace MatchedSuite.Statistics.Sets;

/// <summary>Which interval a conditional model reports.</summary>
internal enum ConditionalInterval
{
    /// <summary>Estimate plus and minus a multiple of the standard error; by the profile where there is no standard error.</summary>
    Wald,

    /// <summary>Where twice the fall of the profile log-likelihood reaches the quantile of chi-squared.</summary>
    Profile,
}
