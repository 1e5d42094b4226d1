namespace MatchedSuite.Statistics.Visits;

/// <summary>Exact null distribution of Page's L given the observed midranks, ties included.</summary>
/// <remarks>Subject after subject the distribution of the sum so far is convolved with that of all rearrangements of the
/// subject's midranks; L is counted in halves, so everything is an integer.</remarks>
internal static class PageNull
{
    private const int MostSubjects = 50, MostVisits = 7, LargestRange = 500;

    /// <summary>
    /// True for tables small enough (well below a millisecond): up to 50 subjects and 7 visits with n·k(k² − 1)/6, the range
    /// of L, at most 500: 50 subjects at 4 visits, 25 at 5, 14 at 6, 8 at 7.
    /// </summary>
    public static bool Covers(int subjects, int visits) =>
        subjects <= MostSubjects && visits <= MostVisits && subjects * visits * (visits * visits - 1) / 6 <= LargestRange;

    /// <summary>Σ j·2r of one subject.</summary>
    public static int DoubledL(ReadOnlySpan<int> doubledRanks)
    {
        int sum = 0;
        for (int j = 0; j < doubledRanks.Length; j++)
            sum += (j + 1) * doubledRanks[j];
        return sum;
    }

    /// <summary>P(L ≤ observed) and P(L ≥ observed).</summary>
    public static (Probability Lower, Probability Upper) Tails(in WithinSubjectRanks ranks, long doubledObserved, Scratch scratch)
    {
        using var frame = scratch.Open();
        int k = ranks.Visits, n = ranks.Subjects, widest = k * (k * k - 1) / 3;
        Span<double> one = frame.Doubles(widest + 1), mass = frame.Doubles(n * widest + 1), next = frame.Doubles(n * widest + 1);
        Span<int> items = frame.Integers(k), turns = frame.Integers(k);
        mass[0] = 1;
        int range = 0;
        long least = 0;
        var steps = one[..0];
        for (int i = 0; i < n; i++)
        {
            // Without ties all subjects have the same distribution.
            if (i == 0 || ranks.HasTies)
                steps = OfOne(ranks.Subject(i), items, turns, one);
            least += Smallest(ranks.Subject(i), items);
            Convolve(mass[..(range + 1)], steps, next);
            range += steps.Length - 1;
            var swap = mass;
            mass = next;
            next = swap;
        }

        int observed = (int)(doubledObserved - least);
        double below = Sum(mass[..(observed + 1)]), above = Sum(mass[observed..(range + 1)]);
        return (Probability.Of(Math.Min(1, below)), Probability.Of(Math.Min(1, above)));
    }

    private static Span<double> OfOne(ReadOnlySpan<int> ranks, Span<int> items, Span<int> turns, Span<double> one)
    {
        int least = Smallest(ranks, items);
        items.Reverse();
        var steps = one[..(DoubledL(items) - least + 1)];
        steps.Clear();
        var orders = new Arrangements(items, turns);
        double share = 1.0 / Arrangements.Count(items.Length);
        do
            steps[DoubledL(items) - least] += share;
        while (orders.Next());
        return steps;
    }

    // The largest ranks at the first visits.
    private static int Smallest(ReadOnlySpan<int> ranks, Span<int> items)
    {
        ranks.CopyTo(items);
        items.Sort();
        items.Reverse();
        return DoubledL(items);
    }

    private static void Convolve(ReadOnlySpan<double> mass, ReadOnlySpan<double> steps, Span<double> sum)
    {
        sum[..(mass.Length + steps.Length - 1)].Clear();
        for (int step = 0; step < steps.Length; step++)
        {
            if (steps[step] == 0)
                continue;
            var to = sum.Slice(step, mass.Length);
            double share = steps[step];
            for (int at = 0; at < mass.Length; at++)
                to[at] += share * mass[at];
        }
    }

    private static double Sum(ReadOnlySpan<double> values)
    {
        double sum = 0;
        foreach (double value in values)
            sum += value;
        return sum;
    }
}
