namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Lower confidence bounds on the number of true discoveries in any list of hypotheses, chosen however and whenever.</summary>
/// <remarks>
/// <para>Closed testing with Simes' local tests: with confidence 1 − level all the bounds hold together, so the analyst may look,
/// choose lists afterwards, and choose again. Valid where Simes' test is: independent or positively dependent p-values.</para>
/// <para>With h the size of the largest set of hypotheses that is not rejected, the bound of a list is the maximum over u of
/// 1 − u + the number of its p-values with h·p ≤ u·level. Bounds cost O(m log m) once and then O(length of the list).</para>
/// <para>Sources: Goeman and Solari (2011), Stat Sci 26, 584-597; Goeman, Meijer, Krebs and Solari (2019), Biometrika 106,
/// 841-856. Worked through in docs/methods/true-discoveries.md.</para>
/// </remarks>
public sealed class ClosedTesting
{
    private readonly Probability[] _p;
    private readonly PValueOrder _order;
    private readonly double _level;

    private ClosedTesting(ReadOnlySpan<Probability> p, double level)
    {
        _p = p.ToArray();
        _order = PValueOrder.Of(p);
        _level = level;
        TrueNullsAtMost = LargestSetNotRejected();
    }

    /// <summary>Number of tested hypotheses.</summary>
    public int Tested => _order.Count;

    /// <summary>Upper confidence bound on the number of true nulls among all that were tested; the rest is the bound of the whole family.</summary>
    public int TrueNullsAtMost { get; }

    /// <summary>Prepares the bounds of one family.</summary>
    /// <param name="p">p-values in any order; missing ones are no hypotheses.</param>
    /// <param name="level">1 − the confidence of all bounds together, strictly between 0 and 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">The level is out of range.</exception>
    public static ClosedTesting WithSimes(ReadOnlySpan<Probability> p, double level)
    {
        Require.OpenUnitInterval(level);
        return new ClosedTesting(p, level);
    }

    /// <summary>With confidence 1 − level, at least so many of the listed hypotheses are false.</summary>
    /// <param name="list">Input positions of the hypotheses, each at most once; those with a missing p-value add nothing.</param>
    /// <exception cref="ArgumentException">A position is out of range or listed twice.</exception>
    public int TrueDiscoveriesAtLeast(ReadOnlySpan<int> list)
    {
        RequireDistinct(list);
        var inCategory = new int[list.Length + 1];
        foreach (int at in list)
        {
            int category = _p[at].IsMissing ? int.MaxValue : Category(_p[at].Value);
            if (category <= list.Length)
                inCategory[category]++;
        }

        int found = 0;
        int counted = 0;
        for (int u = 1; u <= list.Length; u++)
        {
            counted += inCategory[u];
            found = Math.Max(found, 1 - u + counted);
        }

        return found;
    }

    /// <summary>The bounds of the top lists: entry k − 1 belongs to the k smallest p-values (equal ones in input order).</summary>
    public int[] TrueDiscoveriesInTop()
    {
        var bounds = new int[Tested];
        int found = 0;
        for (int place = 0; place < bounds.Length; place++)
        {
            found = Math.Max(found, place + 2 - Category(Sorted(place)));
            bounds[place] = found;
        }

        return bounds;
    }

    // The least u >= 1 with h·p <= u·level; the quotient only starts the search, products decide.
    private int Category(double p)
    {
        double needed = TrueNullsAtMost * p;
        int u = (int)Math.Max(1, Math.Min(Math.Ceiling(needed / _level), int.MaxValue - 1));
        while (u > 1 && needed <= (u - 1) * _level)
            u--;
        while (needed > u * _level)
            u++;
        return u;
    }

    // The worst set of k hypotheses has the k largest p-values, and larger sets of that kind are easier to reject.
    private int LargestSetNotRejected()
    {
        int notRejected = 0;
        int rejected = Tested + 1;
        while (rejected - notRejected > 1)
        {
            int k = notRejected + ((rejected - notRejected) >> 1);
            if (SimesRejectsLargest(k))
                rejected = k;
            else
                notRejected = k;
        }

        return notRejected;
    }

    private bool SimesRejectsLargest(int k)
    {
        for (int j = 1; j <= k; j++)
        {
            if (k * Sorted(Tested - k + j - 1) <= j * _level)
                return true;
        }

        return false;
    }

    private double Sorted(int place) => _p[_order[place]].Value;

    private void RequireDistinct(ReadOnlySpan<int> list)
    {
        var seen = new bool[_p.Length];
        foreach (int at in list)
        {
            if ((uint)at >= (uint)seen.Length || seen[at])
                throw new ArgumentException($"Position {at} is listed twice or lies outside 0 to {seen.Length - 1}.", nameof(list));
            seen[at] = true;
        }
    }
}
