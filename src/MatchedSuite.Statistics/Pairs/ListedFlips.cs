using System.Numerics;

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

    // Listing this many means costs about as much as one more count.
    private const int FewSubsets = 64;

    // A trial shift stays this far from the ends, as a share of what is open: counts are steps and may mislead.
    private const double NearestToEnd = 0.05;

    private readonly ReadOnlySpan<double> _differences;
    private readonly double _tie;
    private readonly Span<double> _left;
    private readonly Span<double> _right;
    private readonly Span<double> _other;
    private readonly Span<int> _subsets;
    private readonly Span<double> _means;

    private ListedFlips(ReadOnlySpan<double> differences, double tie, in Scratch.Frame frame)
    {
        _differences = differences;
        _tie = tie;
        int half = 1 << ((differences.Length + 1) / 2);
        _left = frame.Doubles(half);
        _right = frame.Doubles(half);
        _other = frame.Doubles(half);
        _subsets = frame.Integers(half);
        _means = frame.Doubles(2 * FewSubsets);
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
    /// <remarks>
    /// It is the mean of a subset. Counts at trial shifts close in on its rank until few subsets are left, and these are listed. At a shift
    /// of 0 ties count, so that limit and p-value agree; elsewhere they have no size.
    /// </remarks>
    public double LowerLimit(double share)
    {
        if (1 / Count >= share)
            return double.NegativeInfinity;
        double low = FixedLanes.Smallest(_differences), high = FixedLanes.Largest(_differences);
        double unit = Math.Max(Math.Abs(low), Math.Abs(high)) * Math.ScaleB(1, -52);
        if (SubsetsAtMost(0, _tie) / Count >= share)
        {
            high = Math.Min(high, 0);
            low = Math.Min(low, high);
        }
        else
        {
            low = Math.Max(low, 0);
        }

        double rank = Math.Ceiling(share * Count);
        long below = SubsetsAtMost(low, 0), upTo = SubsetsAtMost(high, 0);
        // Where the rank is outside, a tie at 0 has moved it there.
        if (below >= rank || upTo < rank)
            return below >= rank ? low : high;
        for (int i = 0; high - low > unit; i++)
        {
            if (upTo - below <= FewSubsets && TryMeanOfRank((int)(rank - below), low, high, out double mean))
                return Math.Clamp(mean, low, high);
            double part = i % 2 == 0 ? Math.Clamp((rank - below) / (upTo - below), NearestToEnd, 1 - NearestToEnd) : 0.5;
            double middle = low + (part * (high - low));
            if (middle <= low || middle >= high)
                break;
            long count = SubsetsAtMost(middle, 0);
            if (count >= rank)
                (high, upTo) = (middle, count);
            else
                (low, below) = (middle, count);
        }

        return high;
    }

    // The mean of the given rank among the subsets whose means lie above one shift and up to another; false where rounding blurs who they are.
    private bool TryMeanOfRank(int rank, double low, double high, out double mean)
    {
        int half = _differences.Length / 2;
        var left = Unordered(_differences[..half], low, _left);
        var right = Unordered(_differences[half..], low, _right);
        var subsets = _subsets[..right.Length];
        for (int i = 0; i < subsets.Length; i++)
            subsets[i] = i << half;
        right.Sort(subsets);
        // A subset of k differences lies k times as far above the shift as its mean.
        double reach = (_differences.Length * (high - low)) + _tie;
        int found = 0;
        for (int i = 0; i < left.Length; i++)
        {
            int first = 0, end = right.Length;
            while (first < end)
            {
                int middle = (first + end) / 2;
                if (left[i] + right[middle] > 0)
                    end = middle;
                else
                    first = middle + 1;
            }

            for (; first < right.Length && left[i] + right[first] <= reach && found < _means.Length; first++)
            {
                _means[found] = MeanOf(subsets[first] | i);
                found += _means[found] <= high ? 1 : 0;
            }
        }

        mean = double.NaN;
        if (found < rank || found == _means.Length)
            return false;
        _means[..found].Sort();
        mean = _means[rank - 1];
        return true;
    }

    private double MeanOf(int subset)
    {
        double sum = 0;
        for (int rest = subset; rest != 0; rest &= rest - 1)
            sum += _differences[BitOperations.TrailingZeroCount(rest)];
        return sum / BitOperations.PopCount((uint)subset);
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

    // The same sums, the subset's bits their place.
    private static Span<double> Unordered(ReadOnlySpan<double> differences, double shift, Span<double> sums)
    {
        int count = 1;
        sums[0] = 0;
        foreach (double difference in differences)
        {
            for (int subset = 0; subset < count; subset++)
                sums[count + subset] = sums[subset] + (difference - shift);
            count *= 2;
        }

        return sums[..count];
    }
}
