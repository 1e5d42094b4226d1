namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>The changes of sign that a run compares the data with: random ones, or all there are where these are no more.</summary>
/// <remarks>A pattern is one bit a difference, 1 for a changed sign. The data as they are (no bit set) is not among the listed ones.</remarks>
internal interface ISignPatterns
{
    /// <summary>B, the number of patterns beside the data as they are.</summary>
    int Count { get; }

    /// <summary>True where all patterns are listed.</summary>
    bool Exhaustive { get; }

    /// <summary>Words of 64 bits that hold one pattern.</summary>
    int Words { get; }

    /// <summary>Writes one pattern; difference i is bit i mod 64 of word i/64. Bits beyond the last difference are arbitrary.</summary>
    /// <param name="pattern">Its number, from 0.</param>
    /// <param name="words">Receives it; may be longer than <see cref="Words"/>.</param>
    void Fill(int pattern, Span<ulong> words);

    /// <summary>Variance of the signed sum of one endpoint over all patterns that there are, the data as they are included.</summary>
    /// <param name="differences">The differences, NaN where missing.</param>
    /// <param name="power">What each is multiplied by first.</param>
    double Variance(ReadOnlySpan<double> differences, double power);
}
