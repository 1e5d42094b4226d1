namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>The step-up adjustment of Benjamini and Yekutieli: false discovery rate under any dependence.</summary>
/// <remarks>
/// <para>The adjustment of Benjamini and Hochberg with m·(1 + 1/2 + … + 1/m) in the place of m.</para>
/// <para>Source: Benjamini and Yekutieli (2001), Ann Stat 29, 1165-1188. Worked through in docs/methods/by.md.</para>
/// </remarks>
public static class BenjaminiYekutieli
{
    /// <summary>Adjusts one family.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted.</param>
    /// <param name="adjusted">Receives the adjusted p-values in the same order; missing stays missing.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static void Adjust(ReadOnlySpan<Probability> p, Span<Probability> adjusted) =>
        BenjaminiHochberg.Adjust(p, HarmonicSum(PValueOrder.CountTested(p)), adjusted);

    // Smallest terms first, so that none is lost.
    private static double HarmonicSum(int m)
    {
        double sum = 0;
        for (int k = m; k >= 1; k--)
            sum += 1.0 / k;
        return sum;
    }
}
