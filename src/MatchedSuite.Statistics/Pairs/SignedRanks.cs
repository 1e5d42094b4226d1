namespace MatchedSuite.Statistics.Pairs;

/// <summary>Differences in order and the rank sum of the positive ones: zeros dropped, midranks for ties.</summary>
/// <remarks>
/// Ties and zeros follow the decimal rule of <see cref="PairSample.Roundings"/>. Sizes in ascending order form groups: a
/// size joins the group before it when it lies within the largest rounding of the group and itself from the group's
/// smallest. In <see cref="Sorted"/> zeros are exactly 0 and the members of a group have exactly one size (the middle of the
/// group), so that the Walsh averages tie where the ranks tie.
/// </remarks>
internal readonly ref struct SignedRanks
{
    private SignedRanks(
        ReadOnlySpan<double> sorted, int zeros, int positive, ReadOnlySpan<int> doubledRanks, long doubledPositiveSum, double tieTerm)
    {
        Sorted = sorted;
        Zeros = zeros;
        Positive = positive;
        DoubledRanks = doubledRanks;
        DoubledPositiveSum = doubledPositiveSum;
        TieTerm = tieTerm;
    }

    /// <summary>All differences in ascending order, zeros included.</summary>
    public ReadOnlySpan<double> Sorted { get; }

    /// <summary>Number of zero differences; they have no rank.</summary>
    public int Zeros { get; }

    /// <summary>Number of positive differences.</summary>
    public int Positive { get; }

    /// <summary>Number of ranked differences.</summary>
    public int Ranked => Sorted.Length - Zeros;

    /// <summary>Twice the midrank of each ranked difference in ascending order of size; empty where nothing ties.</summary>
    public ReadOnlySpan<int> DoubledRanks { get; }

    /// <summary>Twice the sum of the ranks of positive differences.</summary>
    public long DoubledPositiveSum { get; }

    /// <summary>Σ(t³ − t) over the groups of t tied sizes.</summary>
    public double TieTerm { get; }

    /// <summary>True where some ranked differences tie.</summary>
    public bool HasTies => TieTerm > 0;

    /// <summary>Ranks the differences of <paramref name="pairs"/> in the memory of <paramref name="frame"/>.</summary>
    public static SignedRanks Of(in PairSample pairs, in Scratch.Frame frame)
    {
        int n = pairs.Count;
        Span<double> sorted = frame.Doubles(n);
        for (int i = 0; i < n; i++)
        {
            double difference = pairs.Differences[i];
            sorted[i] = DecimalTies.IsZero(difference, pairs.Roundings[i]) ? 0 : difference;
        }

        AddressSort.Sort(sorted, frame);
        int negative = 0;
        while (negative < n && sorted[negative] < 0)
            negative++;
        int firstPositive = negative;
        while (firstPositive < n && sorted[firstPositive] == 0)
            firstPositive++;

        int ranked = negative + n - firstPositive;
        Span<double> sizes = frame.Doubles(ranked);
        Span<int> signs = frame.Integers(ranked);
        long positiveSum = Merge(sorted[..negative], sorted[firstPositive..], sizes, signs);
        double largestRounding = n == 0 ? 0 : FixedLanes.Largest(pairs.Roundings);
        if (AllApart(sizes, largestRounding))
            return new SignedRanks(sorted, firstPositive - negative, n - firstPositive, default, 2 * positiveSum, 0);

        Span<int> doubledRanks = frame.Integers(ranked);
        double tieTerm = TieGroups.Rank(pairs, sizes, doubledRanks, frame);
        long doubledPositiveSum = 0;
        int below = negative, above = firstPositive;
        for (int i = 0; i < ranked; i++)
        {
            doubledPositiveSum += signs[i] * (long)doubledRanks[i];
            if (signs[i] == 0)
                sorted[--below] = -sizes[i];
            else
                sorted[above++] = sizes[i];
        }

        return new SignedRanks(sorted, firstPositive - negative, n - firstPositive, doubledRanks, doubledPositiveSum, tieTerm);
    }

    // Sizes in ascending order out of the two sorted halves; sign 1 is positive. Gives the sum of the positives' places.
    private static long Merge(ReadOnlySpan<double> negatives, ReadOnlySpan<double> positives, Span<double> sizes, Span<int> signs)
    {
        int below = negatives.Length - 1, above = 0;
        long positiveSum = 0;
        for (int i = 0; i < sizes.Length; i++)
        {
            double negativeSize = below >= 0 ? -negatives[below] : double.PositiveInfinity;
            double positiveSize = above < positives.Length ? positives[above] : double.PositiveInfinity;
            int isPositive = positiveSize < negativeSize ? 1 : 0;
            sizes[i] = Math.Min(positiveSize, negativeSize);
            signs[i] = isPositive;
            above += isPositive;
            below -= 1 - isPositive;
            positiveSum += isPositive * (i + 1L);
        }

        return positiveSum;
    }

    private static bool AllApart(ReadOnlySpan<double> sizes, double largestRounding)
    {
        for (int i = 1; i < sizes.Length; i++)
        {
            if (sizes[i] - sizes[i - 1] <= largestRounding)
                return false;
        }

        return true;
    }
}
