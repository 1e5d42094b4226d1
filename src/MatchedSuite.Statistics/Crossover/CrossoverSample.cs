namespace MatchedSuite.Statistics.Crossover;

/// <summary>One endpoint of a crossover of two treatments over two periods: what every crossover method sees.</summary>
/// <remarks>Only subjects with both periods; those who had the index treatment first come first, in the order they were given.</remarks>
public readonly ref struct CrossoverSample
{
    private CrossoverSample(ReadOnlySpan<double> firstPeriod, ReadOnlySpan<double> secondPeriod, int indexFirstCount)
    {
        FirstPeriod = firstPeriod;
        SecondPeriod = secondPeriod;
        IndexFirstCount = indexFirstCount;
    }

    /// <summary>Values in period 1.</summary>
    public ReadOnlySpan<double> FirstPeriod { get; }

    /// <summary>Values in period 2, same subjects.</summary>
    public ReadOnlySpan<double> SecondPeriod { get; }

    /// <summary>Subjects who had the index treatment first.</summary>
    public int IndexFirstCount { get; }

    /// <summary>Subjects who had the reference treatment first.</summary>
    public int ReferenceFirstCount => FirstPeriod.Length - IndexFirstCount;

    /// <summary>Subjects.</summary>
    public int Count => FirstPeriod.Length;

    /// <summary>Sorts subjects by sequence into the memory of <paramref name="frame"/>, leaving out those with a period missing.</summary>
    /// <param name="firstPeriod">n values of period 1, NaN where missing.</param>
    /// <param name="secondPeriod">n values of period 2, same subjects.</param>
    /// <param name="sequences">n sequences, same subjects.</param>
    /// <param name="frame">Working memory that outlives the sample.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static CrossoverSample Of(
        ReadOnlySpan<double> firstPeriod, ReadOnlySpan<double> secondPeriod, ReadOnlySpan<TreatmentSequence> sequences, in Scratch.Frame frame)
    {
        Require.SameLength(firstPeriod, secondPeriod);
        if (sequences.Length != firstPeriod.Length)
            throw new ArgumentException($"There are {firstPeriod.Length} subjects and {sequences.Length} sequences; every subject needs one.", nameof(sequences));
        Span<double> first = frame.Doubles(firstPeriod.Length), second = frame.Doubles(firstPeriod.Length);
        int used = 0, indexFirst = 0;
        for (int pass = 0; pass < 2; pass++)
        {
            var wanted = pass == 0 ? TreatmentSequence.IndexFirst : TreatmentSequence.ReferenceFirst;
            for (int i = 0; i < sequences.Length; i++)
            {
                if (sequences[i] != wanted || double.IsNaN(firstPeriod[i]) || double.IsNaN(secondPeriod[i]))
                    continue;
                first[used] = firstPeriod[i];
                second[used++] = secondPeriod[i];
            }

            if (pass == 0)
                indexFirst = used;
        }

        return new CrossoverSample(first[..used], second[..used], indexFirst);
    }
}
