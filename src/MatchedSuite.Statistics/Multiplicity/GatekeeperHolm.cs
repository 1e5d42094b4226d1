namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Families tested one after the other, Holm within each: familywise error rate over all of them under any dependence.</summary>
/// <remarks>
/// <para>A family is opened when every tested hypothesis of the families before it is rejected, and then has the whole alpha.
/// Adjusted p = the larger of Holm's within the family and the largest adjusted p of the families before.</para>
/// <para>Sources: Maurer, Hothorn and Lehmacher (1995); Westfall and Krishen (2001), J Stat Plan Inference 99, 25-40; as a graph
/// Maurer and Bretz (2013), Stat Biopharm Res 5, 311-320. Worked through in docs/methods/gatekeeper-holm.md.</para>
/// </remarks>
public static class GatekeeperHolm
{
    /// <summary>Adjusts all families.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted and hold no gate shut.</param>
    /// <param name="families">The families, numbered in the order of testing.</param>
    /// <param name="adjusted">Receives the adjusted p-values in the order of <paramref name="p"/>; missing stays missing.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static void Adjust(ReadOnlySpan<Probability> p, Families families, Span<Probability> adjusted)
    {
        ArgumentNullException.ThrowIfNull(families);
        families.AdjustEach(Holm.Adjust, p, adjusted);
        var gate = Probability.Zero;
        for (int family = 0; family < families.Count; family++)
        {
            var largest = gate;
            foreach (int at in families.Members(family))
            {
                if (adjusted[at].IsMissing)
                    continue;
                adjusted[at] = Probability.Max(gate, adjusted[at]);
                largest = Probability.Max(largest, adjusted[at]);
            }

            gate = largest;
        }
    }
}
