namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>The step-up on e-values: false discovery rate under any dependence between endpoints and at any number of looks.</summary>
/// <remarks>
/// <para>With e(1) ≥ … ≥ e(m): adjusted value i = min over j ≥ i of min(1, m/(j·e(j))): Benjamini and Hochberg on 1/e.</para>
/// <para>Source: Wang and Ramdas (2022), J R Stat Soc B 84, 822-852. Worked through in docs/methods/e-bh.md.</para>
/// </remarks>
public static class EBenjaminiHochberg
{
    /// <summary>Adjusts one family.</summary>
    /// <param name="logarithms">Decimal logarithms of the e-values, so that neither huge nor tiny ones are lost; NaN where there is none.</param>
    /// <param name="adjusted">Receives the smallest level at which each is rejected, in the same order; missing where there is no e-value.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static void Adjust(ReadOnlySpan<double> logarithms, Span<Probability> adjusted)
    {
        var reciprocals = new Probability[logarithms.Length];
        for (int i = 0; i < reciprocals.Length; i++)
            reciprocals[i] = double.IsNaN(logarithms[i]) ? Probability.Missing : Probability.FromLog10(Math.Min(0, -logarithms[i]));
        BenjaminiHochberg.Adjust(reciprocals, adjusted);
    }
}
