namespace MatchedSuite.Statistics.Pairs;

/// <summary>Which differences are equal as the decimals they were computed from, whatever binary subtraction left.</summary>
/// <remarks>
/// Two differences are equal when they stand at most the larger of their two <see cref="PairSample.Roundings"/> apart; a
/// difference is zero when its size is at most its rounding. 1.94 − 1.27 equals 2.02 − 1.35; tenths on an offset of 1e12
/// keep their order.
/// </remarks>
internal static class DecimalTies
{
    /// <summary>True where the difference is zero as a decimal.</summary>
    public static bool IsZero(double difference, double rounding) => Math.Abs(difference) <= rounding;

    /// <summary>True where every difference equals every other; true for fewer than two.</summary>
    /// <remarks>O(n) unless the spread lies between the smallest and the largest rounding; then O(n log n).</remarks>
    public static bool AllEqual(in PairSample pairs, Scratch scratch)
    {
        if (pairs.Count < 2)
            return true;
        double spread = FixedLanes.Largest(pairs.Differences) - FixedLanes.Smallest(pairs.Differences);
        if (spread > FixedLanes.Largest(pairs.Roundings))
            return false;
        return spread <= FixedLanes.Smallest(pairs.Roundings) || EveryPairIsEqual(pairs, scratch);
    }

    // Of two differences the larger rounding decides: in ascending order of roundings each one must reach all before it.
    private static bool EveryPairIsEqual(in PairSample pairs, Scratch scratch)
    {
        using var frame = scratch.Open();
        Span<double> roundings = frame.Doubles(pairs.Count);
        Span<double> differences = frame.Doubles(pairs.Count);
        pairs.Roundings.CopyTo(roundings);
        pairs.Differences.CopyTo(differences);
        roundings.Sort(differences);
        double smallest = differences[0], largest = differences[0];
        for (int i = 1; i < differences.Length; i++)
        {
            smallest = Math.Min(smallest, differences[i]);
            largest = Math.Max(largest, differences[i]);
            if (differences[i] - smallest > roundings[i] || largest - differences[i] > roundings[i])
                return false;
        }

        return true;
    }
}
