namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>The step-up adjustment of Benjamini and Hochberg: false discovery rate, independent or positively dependent p-values.</summary>
/// <remarks>
/// <para>With p(1) ≤ … ≤ p(m): adjusted p(i) = min over j ≥ i of min(1, m·p(j)/j).</para>
/// <para>Source: Benjamini and Hochberg (1995), J R Stat Soc B 57, 289-300; adjusted form after Yekutieli and Benjamini (1999),
/// J Stat Plan Inference 82, 171-196. Worked through in docs/methods/bh.md.</para>
/// </remarks>
public static class BenjaminiHochberg
{
    /// <summary>Adjusts one family.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted.</param>
    /// <param name="adjusted">Receives the adjusted p-values in the same order; missing stays missing.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static void Adjust(ReadOnlySpan<Probability> p, Span<Probability> adjusted) => Adjust(p, 1, adjusted);

    /// <summary>Adjusts one family with every adjusted p-value inflated by a constant before the ceiling of 1.</summary>
    internal static void Adjust(ReadOnlySpan<Probability> p, double inflation, Span<Probability> adjusted)
    {
        var order = PValueOrder.Of(p, adjusted);
        double m = order.Count * inflation;
        for (int place = 0; place < order.Count; place++)
            adjusted[order[place]] = p[order[place]].Times(m / (place + 1));
        order.LowerToRunningMinimum(adjusted);
    }
}
