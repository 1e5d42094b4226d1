namespace MatchedSuite.Statistics.Pairs;

/// <summary>Events and person-time of both roles, summed over pairs.</summary>
/// <param name="Pairs">Number of pairs.</param>
/// <param name="IndexEvents">Events in the index role.</param>
/// <param name="ReferenceEvents">Events in the reference role.</param>
/// <param name="IndexTime">Person-time of the index role, any unit, greater than 0.</param>
/// <param name="ReferenceTime">Person-time of the reference role, same unit.</param>
public readonly record struct EventTotals(int Pairs, long IndexEvents, long ReferenceEvents, double IndexTime, double ReferenceTime)
{
    // Up to here a double holds every whole number.
    private const double LargestCount = 1L << 53;

    /// <summary>Events of both roles.</summary>
    public long Events => IndexEvents + ReferenceEvents;

    /// <summary>Sums counts whose samples were all observed equally long.</summary>
    /// <exception cref="ArgumentException">A value is not a whole number, 0 or more.</exception>
    public static EventTotals Of(in PairSample pairs) =>
        new(pairs.Count, Sum(pairs.Index), Sum(pairs.Reference), pairs.Count, pairs.Count);

    /// <summary>Sums counts and the person-time of their samples.</summary>
    /// <param name="pairs">Counts.</param>
    /// <param name="indexTime">Person-time of each pair's index sample, greater than 0 and finite.</param>
    /// <param name="referenceTime">The same of the reference samples.</param>
    /// <exception cref="ArgumentException">A value is not a whole number, 0 or more; or the lengths differ.</exception>
    /// <exception cref="ArgumentOutOfRangeException">A person-time is not positive and finite.</exception>
    public static EventTotals Of(in PairSample pairs, ReadOnlySpan<double> indexTime, ReadOnlySpan<double> referenceTime)
    {
        Require.SameLength(pairs.Index, indexTime);
        Require.SameLength(pairs.Reference, referenceTime);
        for (int i = 0; i < indexTime.Length; i++)
        {
            Require.PositiveFinite(indexTime[i], nameof(indexTime));
            Require.PositiveFinite(referenceTime[i], nameof(referenceTime));
        }

        return new(pairs.Count, Sum(pairs.Index), Sum(pairs.Reference), FixedLanes.Sum(indexTime), FixedLanes.Sum(referenceTime));
    }

    private static long Sum(ReadOnlySpan<double> counts)
    {
        long sum = 0;
        foreach (double count in counts)
        {
            if (!(count >= 0 && count <= LargestCount && count == Math.Floor(count)))
                throw new ArgumentException($"A count endpoint has the value {count}; expected a whole number, 0 or more, in every pair.");
            sum = checked(sum + (long)count);
        }

        return sum;
    }
}
