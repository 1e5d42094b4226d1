namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Simes' test that no hypothesis of a family is false: for independent or positively dependent p-values.</summary>
/// <remarks>
/// <para>With p(1) ≤ … ≤ p(m): p = min over i of m·p(i)/i.</para>
/// <para>Source: Simes (1986), Biometrika 73, 751-754. Worked through in docs/methods/simes.md.</para>
/// </remarks>
public static class Simes
{
    /// <summary>The global p-value of one family; missing where nothing was tested.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted.</param>
    public static Probability Global(ReadOnlySpan<Probability> p)
    {
        var order = PValueOrder.Of(p);
        if (order.Count == 0)
            return Probability.Missing;
        var least = Probability.One;
        for (int place = 0; place < order.Count; place++)
            least = Probability.Min(least, p[order[place]].Times((double)order.Count / (place + 1)));
        return least;
    }

    /// <summary>The global p-value of each family; missing where nothing in it was tested.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted.</param>
    /// <param name="families">The family of each p-value.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static Probability[] OfEach(ReadOnlySpan<Probability> p, Families families)
    {
        ArgumentNullException.ThrowIfNull(families);
        Require.OnePerHypothesis(p.Length, families.Hypotheses);
        var global = new Probability[families.Count];
        for (int family = 0; family < global.Length; family++)
            global[family] = Global(families.PValuesOf(family, p));
        return global;
    }
}
