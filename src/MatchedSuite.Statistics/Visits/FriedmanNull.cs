namespace MatchedSuite.Statistics.Visits;

/// <summary>Exact null distribution of Friedman's statistic given the observed midranks, ties included.</summary>
/// <remarks>
/// All rearrangements of the midranks within each subject are equally likely. What is followed from subject to subject is
/// the probability of every vector of rank sums of the first k − 1 visits, on a grid; the last sum is then determined.
/// Sums are integers (doubled midranks), so equal statistics are equal exactly.
/// </remarks>
internal static class FriedmanNull
{
    // Largest tables, by visits: about a millisecond each.
    private static readonly int[] MostSubjects = [0, 0, 50, 15, 6, 3];

    /// <summary>True for tables small enough: 2 visits up to 50 subjects, 3 up to 15, 4 up to 6, 5 up to 3.</summary>
    public static bool Covers(int subjects, int visits) => visits < MostSubjects.Length && subjects <= MostSubjects[visits];

    /// <summary>4 · Σ over visits of (rank sum − mean)²: Friedman's statistic but for a factor that rearranging leaves alone.</summary>
    public static long Departure(in WithinSubjectRanks ranks, in Scratch.Frame frame)
    {
        Span<int> sums = frame.Integers(ranks.Visits);
        sums.Clear();
        for (int i = 0; i < ranks.Subjects; i++)
        {
            var row = ranks.Subject(i);
            for (int j = 0; j < row.Length; j++)
                sums[j] += row[j];
        }

        return Departure(sums, ranks.Subjects);
    }

    /// <summary>Probability of a departure of at least <paramref name="observed"/>.</summary>
    public static Probability UpperTail(in WithinSubjectRanks ranks, long observed, Scratch scratch)
    {
        using var frame = scratch.Open();
        int k = ranks.Visits, n = ranks.Subjects;
        // Halving the doubled midranks where no subject has ties makes the grid smaller by 2^(k−1).
        int unit = ranks.HasTies ? 1 : 2, step = 2 / unit;
        int side = n * (k - 1) * step + 1, cells = 1;
        for (int j = 1; j < k; j++)
            cells *= side;
        Span<double> mass = frame.Doubles(cells), next = frame.Doubles(cells);
        int orders = (int)Arrangements.Count(k);
        Span<int> shifts = frame.Integers(orders), items = frame.Integers(k), turns = frame.Integers(k);
        mass.Clear();
        // The statistic looks at all visits alike, so the first subject may stay as it is.
        mass[Shift(ranks.Subject(0), unit, side)] = 1;
        for (int i = 1; i < n; i++)
        {
            FillShifts(ranks.Subject(i), unit, side, items, turns, shifts);
            next.Clear();
            for (int cell = 0; cell < cells; cell++)
            {
                double share = mass[cell] / orders;
                if (share == 0)
                    continue;
                foreach (int shift in shifts)
                    next[cell + shift] += share;
            }

            var swap = mass;
            mass = next;
            next = swap;
        }

        return Tail(mass, n, k, unit, side, observed, items);
    }

    private static void FillShifts(ReadOnlySpan<int> ranks, int unit, int side, Span<int> items, Span<int> turns, Span<int> shifts)
    {
        ranks.CopyTo(items);
        var orders = new Arrangements(items, turns);
        int to = 0;
        do
            shifts[to++] = Shift(items, unit, side);
        while (orders.Next());
    }

    // Place on the grid of one subject's midranks, counted from the smallest possible.
    private static int Shift(ReadOnlySpan<int> ranks, int unit, int side)
    {
        int at = 0;
        for (int j = 0; j < ranks.Length - 1; j++)
            at = at * side + (ranks[j] - 2) / unit;
        return at;
    }

    private static Probability Tail(ReadOnlySpan<double> mass, int n, int k, int unit, int side, long observed, Span<int> sums)
    {
        double tail = 0;
        for (int cell = 0; cell < mass.Length; cell++)
        {
            if (mass[cell] == 0)
                continue;
            int rest = cell, total = n * k * (k + 1);
            for (int j = k - 2; j >= 0; j--)
            {
                sums[j] = 2 * n + rest % side * unit;
                rest /= side;
                total -= sums[j];
            }

            sums[k - 1] = total;
            if (Departure(sums, n) >= observed)
                tail += mass[cell];
        }

        return Probability.Of(Math.Min(1, tail));
    }

    private static long Departure(ReadOnlySpan<int> doubledSums, int subjects)
    {
        long mean = (long)subjects * (doubledSums.Length + 1), departure = 0;
        foreach (int sum in doubledSums)
            departure += (sum - mean) * (sum - mean);
        return departure;
    }
}
