namespace MatchedSuite.Statistics.Pairs;

/// <summary>Exact tails of a signed-rank sum given the observed midranks, ties included.</summary>
/// <remarks>
/// All 2ᵐ sign assignments of the m midranks are equally likely. Sums are counted in half ranks where there are midranks, so they are integers. Only
/// sums up to the smaller of the two rank sums are followed: no tail needs more. Time O(m · smaller sum).
/// </remarks>
internal static class ConditionalRankSum
{
    /// <summary>P(W ≤ observed) and P(W ≥ observed) for the sum of the ranks of positive differences.</summary>
    /// <param name="doubledRanks">Twice each midrank, at least 1.</param>
    /// <param name="doubledSum">Twice the observed sum of the ranks of positive differences.</param>
    /// <param name="scratch">Working memory.</param>
    public static (Probability Lower, Probability Upper) Tails(ReadOnlySpan<int> doubledRanks, long doubledSum, Scratch scratch)
    {
        long all = 0;
        foreach (int rank in doubledRanks)
            all += rank;
        long smaller = Math.Min(doubledSum, all - doubledSum);

        using var frame = scratch.Open();
        Span<double> mass = frame.Doubles((int)smaller + 1);
        mass.Clear();
        mass[0] = 1;
        long reach = 0;
        foreach (int rank in doubledRanks)
        {
            reach = Math.Min(reach + rank, smaller);
            RankSumStep.AddRank(mass[..((int)reach + 1)], rank);
        }

        double beyond = FixedLanes.Sum(mass[..^1]);
        var tail = Probability.Of(Math.Min(1, beyond + mass[^1]));
        // The other tail contains the observed sum too, and at least half of all; what it lacks is the smaller part.
        var rest = Probability.Of(1 - beyond);
        return doubledSum == smaller ? (tail, rest) : (rest, tail);
    }
}
