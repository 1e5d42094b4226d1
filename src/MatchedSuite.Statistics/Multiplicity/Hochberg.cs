namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Hochberg's step-up adjustment: familywise error rate, independent or positively dependent p-values (those for which Simes' test holds).</summary>
/// <remarks>
/// <para>With p(1) ≤ … ≤ p(m): adjusted p(i) = min over j ≥ i of min(1, (m − j + 1)·p(j)).</para>
/// <para>Source: Hochberg (1988), Biometrika 75, 800-802. Worked through in docs/methods/hochberg.md.</para>
/// </remarks>
public static class Hochberg
{
    /// <summary>Adjusts one family.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted.</param>
    /// <param name="adjusted">Receives the adjusted p-values in the same order; missing stays missing.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static void Adjust(ReadOnlySpan<Probability> p, Span<Probability> adjusted)
    {
        var order = PValueOrder.Of(p, adjusted);
        for (int place = 0; place < order.Count; place++)
            adjusted[order[place]] = p[order[place]].Times(order.Count - place);
        order.LowerToRunningMinimum(adjusted);
    }
}
