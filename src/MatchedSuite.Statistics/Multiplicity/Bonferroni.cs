namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Bonferroni's adjustment: familywise error rate under any dependence, in one step.</summary>
/// <remarks>
/// <para>Adjusted p = min(1, m·p), m the number of tested hypotheses.</para>
/// <para>Source: Dunn (1961), J Am Stat Assoc 56, 52-64. Worked through in docs/methods/bonferroni.md.</para>
/// </remarks>
public static class Bonferroni
{
    /// <summary>Adjusts one family.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted.</param>
    /// <param name="adjusted">Receives the adjusted p-values in the same order; missing stays missing.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static void Adjust(ReadOnlySpan<Probability> p, Span<Probability> adjusted)
    {
        Require.OnePerHypothesis(p.Length, adjusted.Length);
        int m = PValueOrder.CountTested(p);
        for (int i = 0; i < p.Length; i++)
            adjusted[i] = p[i].IsMissing ? Probability.Missing : p[i].Times(m);
    }
}
