namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>The tested hypotheses of one family in ascending order of their p-values; equal ones stay in input order.</summary>
/// <remarks>
/// Missing p-values are no hypotheses: they are neither ordered nor counted. The sort runs on one double a hypothesis,
/// O(m log m).
/// </remarks>
internal sealed class PValueOrder
{
    private readonly int[] _positions;

    private PValueOrder(int[] positions) => _positions = positions;

    /// <summary>Input positions of the tested hypotheses, smallest p-value first.</summary>
    public ReadOnlySpan<int> Positions => _positions;

    /// <summary>Number of tested hypotheses: the m of every procedure.</summary>
    public int Count => _positions.Length;

    /// <summary>Input position of the hypothesis at <paramref name="place"/>, counted from 0 at the smallest p-value.</summary>
    public int this[int place] => _positions[place];

    /// <summary>Orders the tested ones among <paramref name="p"/>.</summary>
    public static PValueOrder Of(ReadOnlySpan<Probability> p)
    {
        var positions = new int[CountTested(p)];
        var keys = new double[positions.Length];
        int used = 0;
        for (int i = 0; i < p.Length; i++)
        {
            if (p[i].IsMissing)
                continue;
            keys[used] = p[i].SortKey;
            positions[used++] = i;
        }

        Array.Sort(keys, positions);
        RestoreInputOrderOfTies(keys, positions);
        return new PValueOrder(positions);
    }

    /// <summary>Orders the tested ones and marks the others missing in <paramref name="adjusted"/>.</summary>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static PValueOrder Of(ReadOnlySpan<Probability> p, Span<Probability> adjusted)
    {
        Require.OnePerHypothesis(p.Length, adjusted.Length);
        for (int i = 0; i < p.Length; i++)
        {
            if (p[i].IsMissing)
                adjusted[i] = Probability.Missing;
        }

        return Of(p);
    }

    /// <summary>How many of <paramref name="p"/> are there.</summary>
    public static int CountTested(ReadOnlySpan<Probability> p)
    {
        int tested = 0;
        foreach (var one in p)
        {
            if (!one.IsMissing)
                tested++;
        }

        return tested;
    }

    /// <summary>Step-down: no hypothesis may be easier to reject than one with a smaller p-value.</summary>
    public void RaiseToRunningMaximum(Span<Probability> adjusted)
    {
        for (int place = 1; place < Count; place++)
            adjusted[_positions[place]] = Probability.Max(adjusted[_positions[place - 1]], adjusted[_positions[place]]);
    }

    /// <summary>Step-up: a hypothesis is as easy to reject as any with a larger p-value.</summary>
    public void LowerToRunningMinimum(Span<Probability> adjusted)
    {
        for (int place = Count - 2; place >= 0; place--)
            adjusted[_positions[place]] = Probability.Min(adjusted[_positions[place + 1]], adjusted[_positions[place]]);
    }

    // The primitive sort is fast but not stable.
    private static void RestoreInputOrderOfTies(double[] keys, int[] positions)
    {
        for (int start = 0; start < keys.Length;)
        {
            int end = start + 1;
            while (end < keys.Length && keys[end] == keys[start])
                end++;
            positions.AsSpan(start, end - start).Sort();
            start = end;
        }
    }
}
