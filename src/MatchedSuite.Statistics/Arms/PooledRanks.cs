namespace MatchedSuite.Statistics.Arms;

/// <summary>Changes of both arms in one ranking, midranks for those equal as decimals.</summary>
/// <remarks>
/// In ascending order a change joins the group before it when it lies within the larger of the group's roundings and its
/// own from the group's smallest. In <see cref="IndexSorted"/> and <see cref="ReferenceSorted"/> the members of a group have
/// exactly one value (the middle of the group), so that differences between arms are 0 where ranks tie.
/// </remarks>
internal readonly ref struct PooledRanks
{
    /// <summary>Changes of the index arm in ascending order.</summary>
    public ReadOnlySpan<double> IndexSorted { get; private init; }

    /// <summary>Changes of the reference arm in ascending order.</summary>
    public ReadOnlySpan<double> ReferenceSorted { get; private init; }

    /// <summary>Twice Mann and Whitney's U: 2 for every pair of subjects in which the index arm's change is larger, 1 where they tie.</summary>
    public long DoubledU { get; private init; }

    /// <summary>Σ(t³ − t) over the groups of t equal changes.</summary>
    public double TieTerm { get; private init; }

    /// <summary>Ranks a sample.</summary>
    public static PooledRanks Of(in ArmSample sample, in Scratch.Frame frame)
    {
        int n = sample.Count, first = sample.IndexCount;
        Span<double> sorted = frame.Doubles(n), index = frame.Doubles(first), reference = frame.Doubles(n - first);
        Span<int> order = frame.Integers(n);
        var roundings = sample.Pairs.Roundings;
        sample.Pairs.Differences.CopyTo(sorted);
        for (int i = 0; i < n; i++)
            order[i] = i;
        sorted.Sort(order);

        long doubledSum = 0;
        double tieTerm = 0;
        int indexUsed = 0, referenceUsed = 0;
        for (int start = 0; start < n;)
        {
            int end = GroupEnd(sorted, order, roundings, start);
            double tied = end - start, middle = sorted[start] + (sorted[end - 1] - sorted[start]) / 2;
            tieTerm += tied * tied * tied - tied;
            for (; start < end; start++)
            {
                if (order[start] >= first)
                {
                    reference[referenceUsed++] = middle;
                    continue;
                }

                index[indexUsed++] = middle;
                doubledSum += 2L * end + 1 - (long)tied;
            }
        }

        return new PooledRanks
        {
            IndexSorted = index,
            ReferenceSorted = reference,
            DoubledU = doubledSum - (long)first * (first + 1),
            TieTerm = tieTerm,
        };
    }

    private static int GroupEnd(ReadOnlySpan<double> sorted, ReadOnlySpan<int> order, ReadOnlySpan<double> roundings, int start)
    {
        double rounding = roundings[order[start]];
        int end = start + 1;
        while (end < sorted.Length && sorted[end] - sorted[start] <= Math.Max(rounding, roundings[order[end]]))
            rounding = Math.Max(rounding, roundings[order[end++]]);
        return end;
    }
}
