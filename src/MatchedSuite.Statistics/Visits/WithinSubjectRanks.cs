namespace MatchedSuite.Statistics.Visits;

/// <summary>Midranks of each complete subject's visits, doubled so that they are integers.</summary>
/// <remarks>
/// Values equal as decimals tie: in ascending order a value joins the group before it when it lies within the larger
/// rounding (4 units in the last place of the values compared) from the group's smallest.
/// </remarks>
internal readonly ref struct WithinSubjectRanks
{
    private WithinSubjectRanks(ReadOnlySpan<int> doubled, int visits, bool hasTies)
    {
        Doubled = doubled;
        Visits = visits;
        HasTies = hasTies;
    }

    /// <summary>Subjects × visits, subject after subject; 2 for the smallest value of a subject.</summary>
    public ReadOnlySpan<int> Doubled { get; }

    /// <summary>Visits.</summary>
    public int Visits { get; }

    /// <summary>True where values of one subject tie.</summary>
    public bool HasTies { get; }

    /// <summary>Complete subjects.</summary>
    public int Subjects => Doubled.Length / Visits;

    /// <summary>One subject's doubled midranks.</summary>
    public ReadOnlySpan<int> Subject(int subject) => Doubled.Slice(subject * Visits, Visits);

    /// <summary>Σ(2r)² − k(k+1)² over the visits of one subject: 4 times the spread of its midranks, 0 where all tie.</summary>
    public long SpreadOf(int subject)
    {
        long spread = -(long)Visits * (Visits + 1) * (Visits + 1);
        foreach (int rank in Subject(subject))
            spread += (long)rank * rank;
        return spread;
    }

    /// <summary>Ranks a sample of complete subjects.</summary>
    public static WithinSubjectRanks Of(in VisitSample complete, in Scratch.Frame frame)
    {
        int visits = complete.Visits;
        Span<int> doubled = frame.Integers(complete.Values.Length), places = frame.Integers(visits);
        Span<double> sorted = frame.Doubles(visits);
        bool ties = false;
        for (int i = 0; i < complete.Subjects; i++)
        {
            Sort(complete.Subject(i), sorted, places);
            ties |= Rank(sorted, places, doubled.Slice(i * visits, visits));
        }

        return new WithinSubjectRanks(doubled, visits, ties);
    }

    // Visits are few: insertion beats everything.
    private static void Sort(ReadOnlySpan<double> values, Span<double> sorted, Span<int> places)
    {
        for (int j = 0; j < values.Length; j++)
        {
            double value = values[j];
            int to = j;
            for (; to > 0 && sorted[to - 1] > value; to--)
                (sorted[to], places[to]) = (sorted[to - 1], places[to - 1]);
            (sorted[to], places[to]) = (value, j);
        }
    }

    private static bool Rank(ReadOnlySpan<double> sorted, ReadOnlySpan<int> places, Span<int> doubled)
    {
        bool ties = false;
        for (int first = 0; first < sorted.Length;)
        {
            double low = sorted[first], lowRounding = DecimalRounding.Of(Math.Abs(low));
            int end = first + 1;
            while (end < sorted.Length && sorted[end] - low <= Math.Max(lowRounding, DecimalRounding.Of(Math.Abs(sorted[end]))))
                end++;
            foreach (int place in places[first..end])
                doubled[place] = first + 1 + end;
            ties |= end - first > 1;
            first = end;
        }

        return ties;
    }
}
