using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Arms;

/// <summary>Null distribution of Mann and Whitney's U without ties: exact counts, and the normal approximation with ties.</summary>
/// <remarks>
/// The number of arrangements with U = u is the coefficient of q^u in the Gaussian binomial coefficient of n₁ + n₂ over n₁,
/// built up factor by factor; up to <see cref="LargestExact"/> subjects every count is below 2⁵³ and so exact.
/// Sources: Mann &amp; Whitney (1947), Annals of Mathematical Statistics 18, 50-60.
/// </remarks>
internal static class MannWhitneyNull
{
    /// <summary>Most subjects of both arms for which arrangements are counted.</summary>
    public const int LargestExact = 50;

    private const double Continuity = 0.5;

    /// <summary>Counts of arrangements with U = 0, 1, … n₁n₂.</summary>
    /// <param name="first">Subjects of one arm.</param>
    /// <param name="second">Subjects of the other; together at most <see cref="LargestExact"/>.</param>
    /// <param name="frame">Working memory.</param>
    public static ReadOnlySpan<double> Counts(int first, int second, in Scratch.Frame frame)
    {
        int fewer = Math.Min(first, second), more = Math.Max(first, second);
        Span<double> counts = frame.Doubles(fewer * more + 1);
        counts.Clear();
        counts[0] = 1;
        for (int i = 1; i <= fewer; i++)
        {
            // Times 1 − q^(more + i), over 1 − q^i; the degree grows to more · i.
            var part = counts[..(more * i + 1)];
            for (int u = part.Length - 1; u >= more + i; u--)
                part[u] -= part[u - more - i];
            for (int u = i; u < part.Length; u++)
                part[u] += part[u - i];
        }

        return counts;
    }

    /// <summary>P(U ≤ u) and P(U ≥ u) from counts.</summary>
    public static (Probability Lower, Probability Upper) Tails(ReadOnlySpan<double> counts, int u)
    {
        double all = Sum(counts);
        return (Probability.Of(Sum(counts[..(u + 1)]) / all), Probability.Of(Sum(counts[u..]) / all));
    }

    /// <summary>Smallest u with P(U ≤ u) ≥ <paramref name="share"/>, from counts.</summary>
    public static long LowerQuantile(ReadOnlySpan<double> counts, double share)
    {
        double all = Sum(counts), below = 0;
        int u = 0;
        for (; u < counts.Length - 1; u++)
        {
            below += counts[u];
            if (below / all >= share)
                break;
        }

        return u;
    }

    /// <summary>P(U ≤ u) and P(U ≥ u), approximately: variance corrected for ties, continuity correction ½.</summary>
    public static (Probability Lower, Probability Upper) NormalTails(double u, int first, int second, double tieTerm)
    {
        double mean = 0.5 * first * second, deviation = Deviation(first, second, tieTerm);
        return (StandardNormal.LowerTail((u + Continuity - mean) / deviation), StandardNormal.UpperTail((u - Continuity - mean) / deviation));
    }

    /// <summary>Smallest u with P(U ≤ u) ≥ <paramref name="share"/>, approximately and without ties.</summary>
    public static long NormalLowerQuantile(int first, int second, double share)
    {
        long largest = (long)first * second;
        double reach = Deviation(first, second, 0) * StandardNormal.UpperQuantile(share);
        long u = Math.Clamp((long)Math.Ceiling(0.5 * largest - Continuity - reach), 0, largest);
        // The quantile may sit within rounding of an integer; the tail itself decides.
        while (u > 0 && NormalTails(u - 1, first, second, 0).Lower.Value >= share)
            u--;
        while (u < largest && NormalTails(u, first, second, 0).Lower.Value < share)
            u++;
        return u;
    }

    private static double Deviation(int first, int second, double tieTerm)
    {
        double n = (double)first + second;
        return Math.Sqrt((double)first * second / 12 * (n + 1 - tieTerm / (n * (n - 1))));
    }

    private static double Sum(ReadOnlySpan<double> counts)
    {
        double sum = 0;
        foreach (double count in counts)
            sum += count;
        return sum;
    }
}
