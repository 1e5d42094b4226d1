using System.Numerics;
using System.Runtime.InteropServices;
using MatchedSuite.Statistics.Randomness;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>Random sign flips of many differences: p-value and limits from the means of the flipped subsets and of the rest.</summary>
/// <remarks>
/// <para>Set i changes sign where bit i mod 64 of word i/64 of the resample's bits is 1. After a shift μ the flipped sum reaches the
/// observed one where the subset's mean is at most μ, and falls to its negative where the mean of the rest is; so counts at μ
/// are counts of means, and limits are means of a certain rank.</para>
/// <para>Sums of subsets of eight differences are tabulated, so that a flip costs one addition for eight sets.</para>
/// </remarks>
internal static class RandomFlips
{
    private const int Together = 8;
    private const int Subsets = 1 << Together;

    /// <summary>p, and the limits; a limit against which nothing is tested is meaningless.</summary>
    /// <param name="differences">At least one difference, not all zero.</param>
    /// <param name="tie">Sums this close are equal.</param>
    /// <param name="options">Sides, confidence, number of flips and seed.</param>
    /// <param name="scratch">Working memory.</param>
    public static (Probability P, double Low, double High) Test(
        ReadOnlySpan<double> differences, double tie, TestOptions options, Scratch scratch)
    {
        using var frame = scratch.Open();
        int resamples = options.Resamples;
        Span<double> lows = frame.Doubles(resamples);
        Span<double> highs = frame.Doubles(resamples);
        double total = Means(differences, tie, options, lows, highs, scratch);

        int reached = 0;
        bool upwards = options.Sides switch { Sides.Greater => true, Sides.Less => false, _ => total >= 0 };
        for (int b = 0; b < resamples; b++)
            reached += (upwards ? lows[b] <= 0 : highs[b] >= 0) ? 1 : 0;
        int rank = LimitRank(resamples, 1 - options.Confidence);
        return (Share(reached, resamples),
            rank == 0 ? double.NegativeInfinity : OrderStatistic.At(lows, rank - 1),
            rank == 0 ? double.PositiveInfinity : OrderStatistic.At(highs, resamples - rank));
    }

    private static Probability Share(int reached, int resamples) => Probability.Of((1.0 + reached) / (1.0 + resamples));

    // Smallest number of means below a shift with which it is not rejected.
    private static int LimitRank(int resamples, double level)
    {
        int rank = (int)Math.Clamp(Math.Ceiling(level * (1.0 + resamples)) - 1, 0, resamples);
        while (rank > 0 && Share(rank - 1, resamples).Value >= level)
            rank--;
        while (rank < resamples && Share(rank, resamples).Value < level)
            rank++;
        return rank;
    }

    // The means below which, and above which, a shift has this flip against it; an empty subset stands against every shift.
    private static double Means(
        ReadOnlySpan<double> differences, double tie, TestOptions options, Span<double> lows, Span<double> highs, Scratch scratch)
    {
        using var frame = scratch.Open();
        int n = differences.Length;
        Span<double> table = frame.Doubles((n + Together - 1) / Together * Subsets);
        Tabulate(differences, table);
        Span<ulong> words = MemoryMarshal.Cast<long, ulong>(frame.Longs((n + 63) / 64));
        var bytes = MemoryMarshal.AsBytes(words)[..((n + Together - 1) / Together)];
        ulong lastMask = ulong.MaxValue >> ((64 - (n % 64)) % 64);
        double total = FixedLanes.Sum(differences);
        for (int b = 0; b < lows.Length; b++)
        {
            CounterRandom.Fill(options.Seed, RandomPurpose.SignFlips, b, words);
            words[^1] &= lastMask;
            int flipped = 0;
            foreach (ulong word in words)
                flipped += BitOperations.PopCount(word);
            double sum = SumOf(bytes, table);
            double mean = Mean(sum, flipped, tie), rest = Mean(total - sum, n - flipped, tie);
            lows[b] = flipped == 0 ? double.NegativeInfinity : mean;
            highs[b] = flipped == 0 ? double.PositiveInfinity : mean;
            if (options.Sides != Sides.Two)
                continue;
            lows[b] = Math.Min(lows[b], flipped == n ? double.NegativeInfinity : rest);
            highs[b] = Math.Max(highs[b], flipped == n ? double.PositiveInfinity : rest);
        }

        return total;
    }

    // Four sums side by side, folded in one order.
    private static double SumOf(ReadOnlySpan<byte> flip, ReadOnlySpan<double> table)
    {
        double first = 0, second = 0, third = 0, fourth = 0;
        int group = 0;
        for (; group <= flip.Length - 4; group += 4)
        {
            var four = table.Slice(group * Subsets, 4 * Subsets);
            first += four[flip[group]];
            second += four[Subsets + flip[group + 1]];
            third += four[(2 * Subsets) + flip[group + 2]];
            fourth += four[(3 * Subsets) + flip[group + 3]];
        }

        double sum = (first + second) + (third + fourth);
        for (; group < flip.Length; group++)
            sum += table[(group * Subsets) + flip[group]];
        return sum;
    }

    private static double Mean(double sum, int count, double tie) => Math.Abs(sum) <= tie ? 0 : sum / count;

    private static void Tabulate(ReadOnlySpan<double> differences, Span<double> table)
    {
        for (int group = 0; group * Subsets < table.Length; group++)
        {
            var sums = table.Slice(group * Subsets, Subsets);
            sums[0] = 0;
            for (int bit = 0; bit < Together; bit++)
            {
                int set = (group * Together) + bit;
                double difference = set < differences.Length ? differences[set] : 0;
                int listed = 1 << bit;
                for (int subset = 0; subset < listed; subset++)
                    sums[listed + subset] = sums[subset] + difference;
            }
        }
    }
}
