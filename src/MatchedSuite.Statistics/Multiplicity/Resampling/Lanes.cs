namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>How endpoints are put side by side for tabulated flips; no result depends on it.</summary>
internal static class Lanes
{
    /// <summary>Endpoints that are summed side by side: a cache line of 32-bit numbers.</summary>
    public const int Endpoints = 16;
}
