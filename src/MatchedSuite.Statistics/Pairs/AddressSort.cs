namespace MatchedSuite.Statistics.Pairs;

/// <summary>Sorts a column of doubles by where each value stands between the smallest and the largest.</summary>
/// <remarks>
/// <para>Values are dealt into as many buckets as there are values, and an insertion sort puts each bucket in order: time O(n) where the
/// values spread, and never more than O(n log n), because a full bucket is sorted by comparison first.</para>
/// <para>Source: sorting by address calculation, Isaac and Singleton (1956), Journal of the ACM 3, 169-174.</para>
/// </remarks>
internal static class AddressSort
{
    // Below this many values comparisons are as fast.
    private const int Smallest = 48;

    // An insertion sort of more values than this is no longer cheap.
    private const int FullBucket = 12;

    /// <summary>Sorts finite values into ascending order, with working memory from <paramref name="frame"/>.</summary>
    public static void Sort(Span<double> values, in Scratch.Frame frame)
    {
        int n = values.Length;
        if (n < Smallest)
        {
            values.Sort();
            return;
        }

        double low = FixedLanes.Smallest(values), high = FixedLanes.Largest(values);
        double perUnit = (n - 1) / (high - low);
        // All equal, or so far apart or so near that the scale leaves the doubles.
        if (!(perUnit > 0 && double.IsFinite(perUnit)))
        {
            values.Sort();
            return;
        }

        Span<int> bucket = frame.Integers(n);
        Span<int> start = frame.Integers(n + 1);
        Span<double> dealt = frame.Doubles(n);
        Deal(values, low, perUnit, bucket, start, dealt);
        SortFullBuckets(dealt, start);
        InsertionSort(dealt);
        dealt.CopyTo(values);
    }

    // Afterwards bucket b holds dealt[start[b]..start[b + 1]].
    private static void Deal(
        ReadOnlySpan<double> values, double low, double perUnit, Span<int> bucket, Span<int> start, Span<double> dealt)
    {
        start.Clear();
        for (int i = 0; i < values.Length; i++)
        {
            int b = Math.Min((int)((values[i] - low) * perUnit), values.Length - 1);
            bucket[i] = b;
            start[b]++;
        }

        int end = 0;
        for (int b = 0; b < start.Length; b++)
        {
            end += start[b];
            start[b] = end;
        }

        // Filled from its end, each entry comes to rest at its bucket's start.
        for (int i = values.Length - 1; i >= 0; i--)
            dealt[--start[bucket[i]]] = values[i];
    }

    private static void SortFullBuckets(Span<double> dealt, ReadOnlySpan<int> start)
    {
        for (int b = 0; b + 1 < start.Length; b++)
        {
            if (start[b + 1] - start[b] > FullBucket)
                dealt[start[b]..start[b + 1]].Sort();
        }
    }

    private static void InsertionSort(Span<double> values)
    {
        for (int i = 1; i < values.Length; i++)
        {
            double value = values[i];
            int place = i;
            while (place > 0 && values[place - 1] > value)
            {
                values[place] = values[place - 1];
                place--;
            }

            values[place] = value;
        }
    }
}
