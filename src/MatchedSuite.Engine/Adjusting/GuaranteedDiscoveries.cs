namespace MatchedSuite.Engine.Adjusting;

/// <summary>With confidence 1 − alpha, how many of the tested primary rows of one contrast and stratum are true discoveries at least.</summary>
/// <param name="Contrast">Position of the contrast in the plan.</param>
/// <param name="Stratum">Code of the stratum.</param>
/// <param name="AtLeast">The bound.</param>
/// <param name="Tested">Number of tested rows.</param>
public sealed record GuaranteedDiscoveries(short Contrast, short Stratum, int AtLeast, int Tested);
