namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>The two-stage step-up of Benjamini, Krieger and Yekutieli: false discovery rate of independent p-values, with the share of true nulls estimated.</summary>
/// <remarks>
/// <para>At level q: Benjamini and Hochberg at q' = q/(1 + q) rejects r; then, unless r is 0 or m, once more at q'·m/(m − r).
/// Where r = m all are rejected.</para>
/// <para>What is rejected at one level is rejected at every higher one, so there is an adjusted p-value that serves every level:
/// the smallest q at which the hypothesis is rejected. With b the adjusted p-values of Benjamini and Hochberg in ascending
/// order and b(0) = 0 it is x/(1 − x), at most 1, where x = min over r of max(b(r), b·(m − r)/m).</para>
/// <para>Source: Benjamini, Krieger and Yekutieli (2006), Biometrika 93, 491-507, definition 6. Worked through in
/// docs/methods/two-stage-bh.md.</para>
/// </remarks>
public static class TwoStageBenjaminiHochberg
{
    /// <summary>Adjusts one family for every level at once.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted.</param>
    /// <param name="adjusted">Receives the smallest level at which each is rejected, in the same order; missing stays missing.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static void Adjust(ReadOnlySpan<Probability> p, Span<Probability> adjusted)
    {
        BenjaminiHochberg.Adjust(p, adjusted);
        var order = PValueOrder.Of(adjusted);
        int m = order.Count;
        var first = new Probability[m];
        for (int place = 0; place < m; place++)
            first[place] = adjusted[order[place]];

        int rejected = 0;
        for (int place = 0; place < m; place++)
        {
            var best = Candidate(first, place, rejected);
            while (rejected < m)
            {
                var next = Candidate(first, place, rejected + 1);
                if (next > best)
                    break;
                best = next;
                rejected++;
            }

            adjusted[order[place]] = best.Value >= 0.5 ? Probability.One : best.Times(1 / (1 - best.Value));
        }
    }

    /// <summary>Adjusts one family for one level; larger or smaller levels need their own.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted.</param>
    /// <param name="level">The level q to which the adjusted p-values may be compared, strictly between 0 and 1.</param>
    /// <param name="adjusted">
    /// Receives min(1, (1 + q)·(m − r)/m·b), b the adjusted p-value of Benjamini and Hochberg, in the same order; (1 + q)·b/m where r = m.
    /// </param>
    /// <exception cref="ArgumentException">The lengths differ, or the level is out of range.</exception>
    public static void Adjust(ReadOnlySpan<Probability> p, double level, Span<Probability> adjusted)
    {
        Require.OpenUnitInterval(level);
        BenjaminiHochberg.Adjust(p, adjusted);
        int m = PValueOrder.CountTested(p);
        int rejected = 0;
        foreach (var one in adjusted)
        {
            if (one.IsAtMost(level / (1 + level)))
                rejected++;
        }

        for (int i = 0; i < p.Length; i++)
            adjusted[i] = adjusted[i].Times((1 + level) * Math.Max(1, m - rejected) / m);
    }

    // Rejecting this many at the first stage needs a level of at least first[rejected - 1]; all of them need no second stage.
    private static Probability Candidate(ReadOnlySpan<Probability> first, int place, int rejected)
    {
        int m = first.Length;
        if (rejected == 0)
            return first[place];
        return rejected == m
            ? first[m - 1]
            : Probability.Max(first[rejected - 1], first[place].Times((double)(m - rejected) / m));
    }
}
