namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Selection of families and then of hypotheses within them: the expected false discovery rate averaged over the selected families.</summary>
/// <remarks>
/// <para>At level q: families are selected by Benjamini and Hochberg at q on their Simes p-values; with R of F selected,
/// each selected family is tested by Benjamini and Hochberg at level R·q/F.</para>
/// <para>What is rejected at one level is rejected at every higher one, so adjusted p-values exist for every level at once: with
/// g the family's adjusted Simes p, g(1) ≤ … ≤ g(F) those of all families, and b the adjusted p within the family, it is
/// min over r of max(g, g(r), F·b/r), at most 1.</para>
/// <para>Source: Benjamini and Bogomolov (2014), J R Stat Soc B 76, 297-318. Worked through in docs/methods/family-selection.md.</para>
/// </remarks>
public static class FamilySelection
{
    /// <summary>Adjusts all families.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted, nor are families without any p-value.</param>
    /// <param name="families">The family of each p-value.</param>
    /// <param name="adjusted">Receives the smallest level at which each is rejected, in the order of <paramref name="p"/>; missing stays missing.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static void Adjust(ReadOnlySpan<Probability> p, Families families, Span<Probability> adjusted)
    {
        ArgumentNullException.ThrowIfNull(families);
        families.AdjustEach(BenjaminiHochberg.Adjust, p, adjusted);
        var selection = new Probability[families.Count];
        BenjaminiHochberg.Adjust(Simes.OfEach(p, families), selection);
        var order = PValueOrder.Of(selection);
        for (int family = 0; family < families.Count; family++)
        {
            foreach (int at in families.Members(family))
            {
                if (!adjusted[at].IsMissing)
                    adjusted[at] = SmallestLevel(selection, order, selection[family], adjusted[at]);
            }
        }
    }

    // More selected families need a higher level to be selected and a lower one within: the best number is where these meet.
    private static Probability SmallestLevel(ReadOnlySpan<Probability> selection, PValueOrder order, Probability family, Probability within)
    {
        int below = 1;
        int above = order.Count;
        while (below < above)
        {
            int middle = below + ((above - below) >> 1);
            if (selection[order[middle - 1]] >= within.Times((double)order.Count / middle))
                above = middle;
            else
                below = middle + 1;
        }

        var best = Level(selection, order, within, below);
        if (below > 1)
            best = Probability.Min(best, Level(selection, order, within, below - 1));
        return Probability.Max(family, best);
    }

    private static Probability Level(ReadOnlySpan<Probability> selection, PValueOrder order, Probability within, int selected) =>
        Probability.Max(selection[order[selected - 1]], within.Times((double)order.Count / selected));
}
