namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Storey's q-values: false discovery rate of independent or weakly dependent p-values, with the share of true nulls estimated.</summary>
/// <remarks>
/// <para>q = π0 times the adjusted p-value of Benjamini and Hochberg, π0 from <see cref="StoreyPi0"/>.</para>
/// <para>Source: Storey (2002), J R Stat Soc B 64, 479-498. Worked through in docs/methods/storey-q.md.</para>
/// </remarks>
public static class StoreyQ
{
    /// <summary>Adjusts one family with π0 estimated at λ = 1/2.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted.</param>
    /// <param name="adjusted">Receives the q-values in the same order; missing stays missing.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static void Adjust(ReadOnlySpan<Probability> p, Span<Probability> adjusted) =>
        Adjust(p, StoreyPi0.AtFixed(p), adjusted);

    /// <summary>Adjusts one family with a given share of true nulls.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted.</param>
    /// <param name="trueNulls">π0, above 0 and at most 1; NaN is accepted where nothing was tested.</param>
    /// <param name="adjusted">Receives the q-values in the same order; missing stays missing.</param>
    /// <exception cref="ArgumentException">The lengths differ, or π0 is out of range.</exception>
    public static void Adjust(ReadOnlySpan<Probability> p, double trueNulls, Span<Probability> adjusted)
    {
        if (trueNulls is <= 0 or > 1)
            throw new ArgumentOutOfRangeException(nameof(trueNulls), trueNulls, "The share of true nulls must lie above 0 and at most at 1.");
        BenjaminiHochberg.Adjust(p, trueNulls, adjusted);
    }
}
