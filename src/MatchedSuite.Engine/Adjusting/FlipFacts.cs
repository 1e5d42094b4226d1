namespace MatchedSuite.Engine.Adjusting;

/// <summary>How the flips of one resampling adjustment of one group went, for the manifest.</summary>
/// <param name="Adjustment">Name of the adjustment.</param>
/// <param name="Flips">Flips compared with the data as they are.</param>
/// <param name="Exhaustive">True where these are all there are.</param>
/// <param name="CriticalValue">What an endpoint's statistic must exceed in a single step at the level; NaN where there is no common one.</param>
internal sealed record FlipFacts(string Adjustment, int Flips, bool Exhaustive, double CriticalValue);
