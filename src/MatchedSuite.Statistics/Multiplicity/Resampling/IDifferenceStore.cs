namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>Where a resampling adjustment finds the differences of its endpoints, or the values of their members: in memory, or in a file where they do not fit.</summary>
/// <remarks>
/// A run reads every endpoint once in any order to rank them, and then once more, least significant first. Several threads
/// read at the same time.
/// </remarks>
public interface IDifferenceStore
{
    /// <summary>Number of endpoints.</summary>
    int Endpoints { get; }

    /// <summary>Number of sets, or of members where labels move; every endpoint has one entry for each.</summary>
    int Sets { get; }

    /// <summary>Reads consecutive endpoints.</summary>
    /// <param name="first">The first endpoint, from 0.</param>
    /// <param name="count">How many endpoints.</param>
    /// <param name="destination">Receives count × <see cref="Sets"/> differences, endpoint after endpoint; NaN where a set or member lacks the endpoint.</param>
    void Read(int first, int count, Span<double> destination);
}
