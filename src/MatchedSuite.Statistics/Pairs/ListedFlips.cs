namespace MatchedSuite.Statistics.Pairs;

/// <summary>All 2ⁿ sign flips of n differences, counted without walking through them one by one.</summary>
/// <remarks>
/// A flip is the subset of differences that change sign; the sum reaches the observed one where the subset's sum is at most 0. The
/// differences are parted in two halves, whose subset sums are listed in order, and one walk along both lists counts all
/// combinations: O(2^(n/2)) instead of O(2ⁿ), and every sum has at most n terms. Source: Horowitz and Sahni (1974), Journal of
/// the ACM 21, 277-292.
/// </remarks>
internal readonly ref struct ListedFlips
{
    public const int LargestCount = 20;

    private readonly ReadOnlySpan<double> _differences;
    private readonly double _tie;
    private readonly Span<double> _left;
    private readonly Span<double> _right;
    private readonly Span<double> _other;

    private ListedFlips(ReadOnlySpan<double> differences, double tie, in Scratch.Frame frame)
    {
        _differences = differences;
        _tie = tie;
        int half = 1 << ((differences.Length + 1) / 2);
        _left = frame.Doubles(half);
        _right = frame.Doubles(half);
        _other = frame.Doubles(half);
    }

    private double Count => 1L << _differences.Length;

    /// <summary>Prepares the flips of 1 to <see cref="LargestCount"/> differences.</summary>
    /// <param name="differences">The differences.</param>
    /// <param name="tie">Sums this close are equal.</param>
    /// <param name="frame">Working memory that outlives the flips.</param>
    public static ListedFlips Of(ReadOnlySpan<double> differences, double tie, in Scratch.Frame frame) => new(differences, tie, frame);

    /// <summary>Share of the flips whose sum is at least the observed one, the data as they are included.</summary>
    public Probability UpperTail() => Probability.Of(SubsetsAtMost(0, _tie) / Count);

    /// <summary>Smallest shift whose upper tail is at least <paramref name="share"/>; negative infinity where every shift's is.</summary>
    /// <remarks>Found by halving to the last digit of the largest difference, about 55 counts. At a shift of 0 ties count, elsewhere they have no size.</remarks>
    public double LowerLimit(double share)
    {
        if (1 / Count >= share)
            return double.NegativeInfinity;
        double largest = FixedLanes.Largest(_differences), smallest = FixedLanes.Smallest(_differences);
        double low = smallest, high = largest;
        if (SubsetsAtMost(0, _tie) / Count >= share)
        {
            high = Math.Min(high, 0);
            low = Math.Min(low, high);
        }
        else
        {
            low = Math.Max(low, 0);
        }

        double unit = Math.Max(Math.Abs(smallest), Math.Abs(largest)) * Math.ScaleB(1, -52);
        while (high - low > unit)
        {
            double middle = low + (0.5 * (high - low));
            if (middle == low || middle == high)
                break;
            if (SubsetsAtMost(middle, 0) / Count >= share)
                high = middle;
            else
                low = middle;
        }

        return high;
    }

    private long SubsetsAtMost(double shift, double limit)
    {
        int half = _differences.Length / 2;
        var left = Sums(_differences[..half], shift, _left, _other);
        var right = Sums(_differences[half..], shift, _right, _other);
        long count = 0;
        int end = right.Length;
        foreach (double sum in left)
        {
            while (end > 0 && sum + right[end - 1] > limit)
                end--;
            count += end;
        }

        return count;
    }

    // Sums of all subsets in ascending order: each further difference merges the list with itself moved.
    private static ReadOnlySpan<double> Sums(ReadOnlySpan<double> differences, double shift, Span<double> sums, Span<double> other)
    {
        int count = 1;
        sums[0] = 0;
        foreach (double difference in differences)
        {
            double step = difference - shift;
            int plain = 0, moved = 0;
            for (int i = 0; i < 2 * count; i++)
            {
                bool takesPlain = moved == count || (plain < count && sums[plain] <= sums[moved] + step);
                other[i] = takesPlain ? sums[plain++] : sums[moved++] + step;
            }

            count *= 2;
            other[..count].CopyTo(sums);
        }

        return sums[..count];
    }
}
