using System.Numerics;
using MatchedSuite.Statistics.Randomness;

namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>The flips of whole sets that a run compares the data with: random ones, or all there are where these are no more.</summary>
/// <remarks>A flip is one bit a set, 1 for a changed sign. The data as they are (no bit set) is not among the listed ones.</remarks>
internal sealed class CommonFlips : ISignPatterns
{
    private readonly long _seed;

    public CommonFlips(int sets, long seed, int resamples)
    {
        _seed = seed;
        Exhaustive = sets <= BitOperations.Log2((uint)resamples + 1);
        Count = Exhaustive ? (1 << sets) - 1 : resamples;
        Words = (sets + 63) / 64;
    }

    /// <inheritdoc/>
    public int Count { get; }

    /// <inheritdoc/>
    public bool Exhaustive { get; }

    /// <inheritdoc/>
    public int Words { get; }

    /// <inheritdoc/>
    public void Fill(int flip, Span<ulong> words)
    {
        if (Exhaustive)
            words[0] = (ulong)flip + 1;
        else
            CounterRandom.Fill(_seed, RandomPurpose.SignFlips, flip, words[..Words]);
    }

    /// <inheritdoc/>
    public double Variance(ReadOnlySpan<double> differences, double power)
    {
        double squares = 0;
        foreach (double difference in differences)
        {
            if (double.IsNaN(difference))
                continue;
            double scaled = difference * power;
            squares += scaled * scaled;
        }

        return squares;
    }
}
