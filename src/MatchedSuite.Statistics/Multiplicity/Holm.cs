namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Holm's step-down adjustment: familywise error rate under any dependence, never weaker than Bonferroni's.</summary>
/// <remarks>
/// <para>With p(1) ≤ … ≤ p(m): adjusted p(i) = max over j ≤ i of min(1, (m − j + 1)·p(j)).</para>
/// <para>Weighted: hypotheses are ordered by p/w, and the factor of the j-th is the weight still in play, Σ(k ≥ j) w(k), over
/// its own weight w(j).</para>
/// <para>Source: Holm (1979), Scand J Stat 6, 65-70. Worked through in docs/methods/holm.md.</para>
/// </remarks>
public static class Holm
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
        order.RaiseToRunningMaximum(adjusted);
    }

    /// <summary>Adjusts one family whose hypotheses carry weights.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted, nor is their weight.</param>
    /// <param name="weights">One finite weight a hypothesis, 0 or more; only ratios matter. Weight 0 is never rejected.</param>
    /// <param name="adjusted">Receives the adjusted p-values in the same order; missing stays missing.</param>
    /// <exception cref="ArgumentException">The lengths differ, or a weight is negative or not finite.</exception>
    public static void Adjust(ReadOnlySpan<Probability> p, ReadOnlySpan<double> weights, Span<Probability> adjusted)
    {
        Require.OnePerHypothesis(p.Length, weights.Length);
        Require.Weights(weights);
        var order = WeightedOrder(p, weights, adjusted);
        double inPlay = 0;
        for (int place = order.Count - 1; place >= 0; place--)
        {
            int at = order[place];
            inPlay += weights[at];
            adjusted[at] = weights[at] > 0 ? p[at].Times(inPlay / weights[at]) : Probability.One;
        }

        order.RaiseToRunningMaximum(adjusted);
    }

    // Ratios to the smallest weight only lower a p-value, so none reaches the ceiling of 1 and loses its place.
    private static PValueOrder WeightedOrder(ReadOnlySpan<Probability> p, ReadOnlySpan<double> weights, Span<Probability> adjusted)
    {
        Require.OnePerHypothesis(p.Length, adjusted.Length);
        double smallest = double.PositiveInfinity;
        for (int i = 0; i < p.Length; i++)
        {
            if (weights[i] > 0 && !p[i].IsMissing)
                smallest = Math.Min(smallest, weights[i]);
        }

        var ratios = new Probability[p.Length];
        for (int i = 0; i < p.Length; i++)
            ratios[i] = p[i].IsMissing || weights[i] > 0 ? p[i].Times(smallest / weights[i]) : Probability.One;

        return PValueOrder.Of(ratios, adjusted);
    }
}
