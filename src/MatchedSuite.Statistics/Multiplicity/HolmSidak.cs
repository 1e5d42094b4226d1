namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Holm's step-down with Šidák's factors: familywise error rate, independent or positively orthant dependent p-values.</summary>
/// <remarks>
/// <para>With p(1) ≤ … ≤ p(m): adjusted p(i) = max over j ≤ i of 1 − (1 − p(j))^(m − j + 1).</para>
/// <para>Source: Holland and Copenhaver (1987), Biometrics 43, 417-423. Worked through in docs/methods/holm-sidak.md.</para>
/// </remarks>
public static class HolmSidak
{
    /// <summary>Adjusts one family.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted.</param>
    /// <param name="adjusted">Receives the adjusted p-values in the same order; missing stays missing.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static void Adjust(ReadOnlySpan<Probability> p, Span<Probability> adjusted)
    {
        var order = PValueOrder.Of(p, adjusted);
        for (int place = 0; place < order.Count; place++)
            adjusted[order[place]] = Sidak.AtLeastOnce(p[order[place]], order.Count - place);
        order.RaiseToRunningMaximum(adjusted);
    }
}
