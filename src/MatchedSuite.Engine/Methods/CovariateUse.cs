namespace MatchedSuite.Engine.Methods;

/// <summary>What a method does with covariates.</summary>
public enum CovariateUse
{
    /// <summary>It leaves them aside; its rows say so.</summary>
    Ignored,

    /// <summary>It adjusts for them, on the sets whose covariates are all known.</summary>
    Adjusted,
}
