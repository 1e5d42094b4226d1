using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Arms;

/// <summary>One endpoint measured at baseline and follow-up on the subjects of two arms: what every change method sees.</summary>
/// <remarks>Only subjects with both values; those of the index arm come first, in the order they were given.</remarks>
public readonly ref struct ArmSample
{
    private ArmSample(scoped in PairSample pairs, int indexCount)
    {
        Pairs = pairs;
        IndexCount = indexCount;
    }

    /// <summary>Follow-up and baseline of each subject; differences are changes, follow-up minus baseline.</summary>
    public PairSample Pairs { get; }

    /// <summary>Subjects of the index arm.</summary>
    public int IndexCount { get; }

    /// <summary>Subjects of the reference arm.</summary>
    public int ReferenceCount => Pairs.Count - IndexCount;

    /// <summary>Subjects.</summary>
    public int Count => Pairs.Count;

    /// <summary>Changes of the index arm.</summary>
    public ReadOnlySpan<double> IndexChanges => Pairs.Differences[..IndexCount];

    /// <summary>Changes of the reference arm.</summary>
    public ReadOnlySpan<double> ReferenceChanges => Pairs.Differences[IndexCount..];

    /// <summary>Sorts subjects by arm into the memory of <paramref name="frame"/>, leaving out those with a value missing.</summary>
    /// <param name="baseline">n values before, NaN where missing.</param>
    /// <param name="followUp">n values after, same subjects.</param>
    /// <param name="arms">n arms, same subjects.</param>
    /// <param name="frame">Working memory that outlives the sample.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static ArmSample Of(
        ReadOnlySpan<double> baseline, ReadOnlySpan<double> followUp, ReadOnlySpan<Arm> arms, in Scratch.Frame frame)
    {
        Require.SameLength(baseline, followUp);
        if (arms.Length != baseline.Length)
            throw new ArgumentException($"There are {baseline.Length} subjects and {arms.Length} arms; every subject needs one.", nameof(arms));
        Span<double> before = frame.Doubles(baseline.Length), after = frame.Doubles(baseline.Length);
        int used = Gather(baseline, followUp, arms, Arm.Index, before, after);
        int all = used + Gather(baseline, followUp, arms, Arm.Reference, before[used..], after[used..]);
        return new ArmSample(PairSample.Of(after[..all], before[..all], frame), used);
    }

    /// <summary>A sample of which only the changes are known; an adjustment for baseline is then impossible.</summary>
    /// <param name="changes">n changes, NaN where missing.</param>
    /// <param name="arms">n arms, same subjects.</param>
    /// <param name="frame">Working memory that outlives the sample.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static ArmSample OfChanges(ReadOnlySpan<double> changes, ReadOnlySpan<Arm> arms, in Scratch.Frame frame)
    {
        Span<double> none = frame.Doubles(changes.Length);
        none.Clear();
        return Of(none, changes, arms, frame);
    }

    private static int Gather(
        ReadOnlySpan<double> baseline, ReadOnlySpan<double> followUp, ReadOnlySpan<Arm> arms, Arm wanted, Span<double> before, Span<double> after)
    {
        int used = 0;
        for (int i = 0; i < arms.Length; i++)
        {
            if (arms[i] != wanted || double.IsNaN(baseline[i]) || double.IsNaN(followUp[i]))
                continue;
            before[used] = baseline[i];
            after[used++] = followUp[i];
        }

        return used;
    }
}
