namespace MatchedSuite.Statistics.Pairs;

/// <summary>Null distribution of the signed-rank sum of n untied differences: each of the ranks 1..n is positive with probability ½.</summary>
/// <remarks>
/// Built once for each n up to <see cref="LargestN"/> and kept for the life of the process (at most 0.5 MB each, usually a
/// few n), so a tail is a look-up. The recursion f(w) ← ½·f(w) + ½·f(w − k) only adds positive terms and
/// 2⁻⁵⁰⁰ is a normal double, so every tail keeps its relative precision. Source: Wilcoxon (1945), Biometrics Bulletin 1, 80-83.
/// </remarks>
internal sealed class SignedRankNull
{
    /// <summary>Largest n for which the distribution is tabulated.</summary>
    public const int LargestN = 500;

    private static readonly SignedRankNull?[] Built = new SignedRankNull?[LargestN + 1];

    // P(W <= w) for w = 0 .. floor(largest sum / 2); the rest follows by symmetry.
    private readonly double[] _atMost;

    private SignedRankNull(int n)
    {
        LargestSum = (long)n * (n + 1) / 2;
        _atMost = LowerHalf(n);
    }

    /// <summary>Sum of all ranks, n(n+1)/2.</summary>
    public long LargestSum { get; }

    /// <summary>The distribution for n differences, 1 ≤ n ≤ <see cref="LargestN"/>.</summary>
    /// <remarks>Two threads may build the same table at once; both are the same bits and one is kept.</remarks>
    public static SignedRankNull Of(int n)
    {
        var built = Volatile.Read(ref Built[n]);
        if (built is not null)
            return built;
        var made = new SignedRankNull(n);
        return Interlocked.CompareExchange(ref Built[n], made, null) ?? made;
    }

    /// <summary>P(W ≤ w).</summary>
    public Probability AtMost(long w)
    {
        if (w < 0)
            return Probability.Zero;
        return w >= LargestSum ? Probability.One : Probability.Of(Lower(w));
    }

    /// <summary>P(W ≥ w).</summary>
    public Probability AtLeast(long w) => AtMost(LargestSum - w);

    /// <summary>Smallest w with P(W ≤ w) ≥ <paramref name="share"/>.</summary>
    public long LowerQuantile(double share)
    {
        long low = 0, high = LargestSum;
        while (low < high)
        {
            long middle = low + ((high - low) / 2);
            if (Lower(middle) >= share)
                high = middle;
            else
                low = middle + 1;
        }

        return low;
    }

    // P(W <= w) for 0 <= w < largest sum. Beyond the middle the complement is the smaller part, so the subtraction loses nothing.
    private double Lower(long w) => w < _atMost.Length ? _atMost[w] : 1 - _atMost[LargestSum - w - 1];

    private double[] LowerHalf(int n)
    {
        var mass = new double[(LargestSum / 2) + 1];
        mass[0] = 1;
        long reach = 0;
        for (int rank = 1; rank <= n; rank++)
        {
            reach = Math.Min(reach + rank, mass.Length - 1);
            RankSumStep.AddRank(mass.AsSpan(0, (int)reach + 1), rank);
        }

        double sum = 0, lost = 0;
        for (int w = 0; w < mass.Length; w++)
        {
            double next = sum + mass[w];
            lost += Math.Abs(sum) >= mass[w] ? sum - next + mass[w] : mass[w] - next + sum;
            sum = next;
            mass[w] = sum + lost;
        }

        return mass;
    }
}
