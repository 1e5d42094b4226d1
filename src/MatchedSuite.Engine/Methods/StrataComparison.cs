namespace MatchedSuite.Engine.Methods;

/// <summary>How a method's results are compared between strata.</summary>
public enum StrataComparison
{
    /// <summary>Not at all: the method has no estimate, or is finished after the stream.</summary>
    None,

    /// <summary>As means with Student's t: Welch's test.</summary>
    Means,

    /// <summary>As discordant counts: exact for two strata, by log odds ratios for more.</summary>
    Discordance,

    /// <summary>As estimates with a standard error or interval: normal or chi-squared.</summary>
    Estimates,
}
