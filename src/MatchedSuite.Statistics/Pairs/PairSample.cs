namespace MatchedSuite.Statistics.Pairs;

/// <summary>One endpoint measured on complete pairs: what every pair method sees.</summary>
/// <remarks>
/// All spans have one entry a pair, in the same order, finite. A difference is index minus reference on the analysis
/// scale. <see cref="Roundings"/> says how far two differences may stand apart and still be equal as decimals: 4 units in
/// the last place of the larger of the two values that the difference was computed from.
/// </remarks>
public readonly ref struct PairSample
{
    private PairSample(
        ReadOnlySpan<double> index, ReadOnlySpan<double> reference, ReadOnlySpan<double> differences, ReadOnlySpan<double> roundings)
    {
        Index = index;
        Reference = reference;
        Differences = differences;
        Roundings = roundings;
    }

    /// <summary>Values of the index role.</summary>
    public ReadOnlySpan<double> Index { get; }

    /// <summary>Values of the reference role.</summary>
    public ReadOnlySpan<double> Reference { get; }

    /// <summary>Index minus reference, pair by pair.</summary>
    public ReadOnlySpan<double> Differences { get; }

    /// <summary>How much of each difference may be left by binary subtraction of decimals.</summary>
    public ReadOnlySpan<double> Roundings { get; }

    /// <summary>Number of pairs.</summary>
    public int Count => Differences.Length;

    /// <summary>Takes the differences of complete pairs into the memory of <paramref name="frame"/>.</summary>
    /// <param name="index">n finite values of the index role.</param>
    /// <param name="reference">n finite values of the reference role, same pair order.</param>
    /// <param name="frame">Working memory that outlives the sample.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static PairSample Of(ReadOnlySpan<double> index, ReadOnlySpan<double> reference, in Scratch.Frame frame)
    {
        Require.SameLength(index, reference);
        int n = index.Length;
        Span<double> differences = frame.Doubles(n);
        Span<double> roundings = frame.Doubles(n);
        for (int i = 0; i < n; i++)
        {
            differences[i] = index[i] - reference[i];
            roundings[i] = DecimalRounding.Of(Math.Max(Math.Abs(index[i]), Math.Abs(reference[i])));
        }

        return new PairSample(index, reference, differences, roundings);
    }
}
