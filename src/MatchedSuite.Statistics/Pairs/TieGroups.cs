namespace MatchedSuite.Statistics.Pairs;

/// <summary>Midranks of sizes in ascending order, tied by the decimal rule.</summary>
internal static class TieGroups
{
    /// <summary>Ranks the sizes and gives every member of a group the middle of its group.</summary>
    /// <param name="pairs">The sample the sizes come from; supplies the roundings.</param>
    /// <param name="sizes">Sizes of the non-zero differences in ascending order; changed to one size a group.</param>
    /// <param name="doubledRanks">Receives twice the midrank of each size.</param>
    /// <param name="frame">Working memory.</param>
    /// <returns>Σ(t³ − t) over the groups.</returns>
    public static double Rank(in PairSample pairs, Span<double> sizes, Span<int> doubledRanks, in Scratch.Frame frame)
    {
        double smallest = FixedLanes.Smallest(pairs.Roundings), largest = FixedLanes.Largest(pairs.Roundings);
        return RoundingsDecide(sizes, smallest, largest)
            ? ByOwnRoundings(pairs, sizes, doubledRanks, frame)
            : ByOneRounding(sizes, smallest, doubledRanks);
    }

    // Only a gap between the smallest and the largest rounding depends on whose rounding it is.
    private static bool RoundingsDecide(ReadOnlySpan<double> sizes, double smallest, double largest)
    {
        int first = 0;
        for (int i = 1; i < sizes.Length; i++)
        {
            double gap = sizes[i] - sizes[first];
            if (gap <= smallest)
                continue;
            if (gap <= largest)
                return true;
            first = i;
        }

        return false;
    }

    private static double ByOneRounding(Span<double> sizes, double rounding, Span<int> doubledRanks)
    {
        double tieTerm = 0;
        for (int first = 0; first < sizes.Length;)
        {
            int end = first + 1;
            while (end < sizes.Length && sizes[end] - sizes[first] <= rounding)
                end++;
            tieTerm += Close(first, end, sizes, doubledRanks);
            first = end;
        }

        return tieTerm;
    }

    private static double ByOwnRoundings(in PairSample pairs, Span<double> sizes, Span<int> doubledRanks, in Scratch.Frame frame)
    {
        Span<double> keys = frame.Doubles(sizes.Length);
        Span<double> roundings = frame.Doubles(sizes.Length);
        int kept = 0;
        for (int i = 0; i < pairs.Count; i++)
        {
            if (DecimalTies.IsZero(pairs.Differences[i], pairs.Roundings[i]))
                continue;
            keys[kept] = Math.Abs(pairs.Differences[i]);
            roundings[kept++] = pairs.Roundings[i];
        }

        keys.Sort(roundings);
        double tieTerm = 0;
        for (int first = 0; first < sizes.Length;)
        {
            double rounding = roundings[first];
            int end = first + 1;
            while (end < sizes.Length && sizes[end] - sizes[first] <= Math.Max(rounding, roundings[end]))
                rounding = Math.Max(rounding, roundings[end++]);
            tieTerm += Close(first, end, sizes, doubledRanks);
            first = end;
        }

        return tieTerm;
    }

    private static double Close(int first, int end, Span<double> sizes, Span<int> doubledRanks)
    {
        double middle = sizes[first] + ((sizes[end - 1] - sizes[first]) / 2);
        sizes[first..end].Fill(middle);
        doubledRanks[first..end].Fill(first + 1 + end);
        double tied = end - first;
        return (tied * tied * tied) - tied;
    }
}
