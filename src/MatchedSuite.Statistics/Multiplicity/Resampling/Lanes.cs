namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>How endpoints and sets are grouped for tabulated flips; no result depends on it.</summary>
internal static class Lanes
{
    /// <summary>Endpoints that are summed side by side.</summary>
    public const int Endpoints = 16;

    /// <summary>
    /// Sets whose signed sums are tabulated together. Six sets give tables of 4 KiB: eight of them fit into a first-level cache
    /// of 32 KiB together with nothing else, and building them costs little beside a thousand lookups.
    /// </summary>
    public const int GroupSets = 6;

    /// <summary>Sign patterns of one group.</summary>
    public const int Patterns = 1 << GroupSets;

    /// <summary>Groups that cover all sets.</summary>
    public static int Groups(int sets) => (sets + GroupSets - 1) / GroupSets;
}
