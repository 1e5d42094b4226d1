using System.Numerics;
using MatchedSuite.Statistics.Randomness;

namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>The flips of whole sets that a run compares the data with: random ones, or all there are where these are no more.</summary>
/// <remarks>A flip is one bit a set, 1 for a changed sign. The data as they are (no bit set) is not among the listed ones.</remarks>
internal sealed class CommonFlips
{
    private readonly long _seed;

    public CommonFlips(int sets, long seed, int resamples)
    {
        _seed = seed;
        Exhaustive = sets <= BitOperations.Log2((uint)resamples + 1);
        Count = Exhaustive ? (1 << sets) - 1 : resamples;
        Words = (sets + 63) / 64;
    }

    /// <summary>B, the number of flips beside the data as they are.</summary>
    public int Count { get; }

    /// <summary>True where all flips are listed.</summary>
    public bool Exhaustive { get; }

    /// <summary>Words of 64 sets that hold one flip.</summary>
    public int Words { get; }

    /// <summary>Writes flip number <paramref name="flip"/>, from 0; set i is bit i mod 64 of word i/64. Bits beyond the last set are arbitrary.</summary>
    public void Fill(int flip, Span<ulong> words)
    {
        if (Exhaustive)
            words[0] = (ulong)flip + 1;
        else
            CounterRandom.Fill(_seed, RandomPurpose.SignFlips, flip, words[..Words]);
    }
}
