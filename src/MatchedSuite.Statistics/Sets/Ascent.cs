namespace MatchedSuite.Statistics.Sets;

/// <summary>How a climb to the maximum of the conditional likelihood ended.</summary>
internal enum Ascent
{
    /// <summary>At the maximum.</summary>
    Reached,

    /// <summary>The likelihood rises for ever; <see cref="ConditionalMaximum.Step"/> is a direction along which it does.</summary>
    Endless,

    /// <summary>Neither was established.</summary>
    Lost,
}
