namespace MatchedSuite.Statistics.Pairs;

/// <summary>Twice the signed midrank of every pair's difference: what a flip of signs adds up in the signed-rank test.</summary>
/// <remarks>
/// Zeros get 0 and take no rank; ties get midranks; both by the decimals, as in <see cref="SignedRank"/>. Doubled, the ranks are
/// whole numbers. The sum of all is 4·V − m·(m + 1), V the rank sum of the positive ones among m ranked differences.
/// </remarks>
public static class SignedRankScores
{
    /// <summary>Scores every pair.</summary>
    /// <param name="pairs">The pairs.</param>
    /// <param name="scores">Receives one score a pair, in the pairs' order.</param>
    /// <param name="scratch">Working memory.</param>
    /// <exception cref="ArgumentException"><paramref name="scores"/> has not one entry a pair.</exception>
    public static void Of(in PairSample pairs, Span<double> scores, Scratch scratch)
    {
        ArgumentNullException.ThrowIfNull(scratch);
        Require.SameLength(pairs.Differences, scores);
        using var frame = scratch.Open();
        Span<double> sizes = frame.Doubles(pairs.Count);
        Span<int> positions = frame.Integers(pairs.Count);
        int ranked = 0;
        for (int i = 0; i < pairs.Count; i++)
        {
            scores[i] = 0;
            if (DecimalTies.IsZero(pairs.Differences[i], pairs.Roundings[i]))
                continue;
            sizes[ranked] = Math.Abs(pairs.Differences[i]);
            positions[ranked++] = i;
        }

        if (ranked == 0)
            return;
        sizes = sizes[..ranked];
        positions = positions[..ranked];
        sizes.Sort(positions);
        Span<int> doubledRanks = frame.Integers(ranked);
        TieGroups.Rank(pairs, sizes, doubledRanks, frame);
        for (int rank = 0; rank < ranked; rank++)
            scores[positions[rank]] = Math.CopySign(doubledRanks[rank], pairs.Differences[positions[rank]]);
    }
}
