namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Hommel's adjustment, closed testing with Simes' tests: familywise error rate under the conditions of Simes' test.</summary>
/// <remarks>
/// <para>Adjusted p = the largest Simes p-value of any set of hypotheses that holds this one. With S(k) the Simes p-value of
/// the k largest p-values, which falls as k grows, adjusted p = min over k of max(S(k + 1), k·p).</para>
/// <para>All S(k) come from one divide and conquer, O(m log m), and the minimising k only falls as p grows.</para>
/// <para>Sources: Hommel (1988), Biometrika 75, 383-386; Meijer, Krebs and Goeman (2019), Stat Appl Genet Mol Biol 18,
/// for the fast form. Worked through in docs/methods/hommel.md.</para>
/// </remarks>
public static class Hommel
{
    /// <summary>Adjusts one family.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted.</param>
    /// <param name="adjusted">Receives the adjusted p-values in the same order; missing stays missing.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static void Adjust(ReadOnlySpan<Probability> p, Span<Probability> adjusted)
    {
        var order = PValueOrder.Of(p, adjusted);
        int m = order.Count;
        var ascending = new Probability[m];
        for (int place = 0; place < m; place++)
            ascending[place] = p[order[place]];

        var largest = LargestSimes.Of(ascending);
        int k = m;
        for (int place = 0; place < m; place++)
        {
            var best = Candidate(ascending[place], k, largest);
            while (k > 1)
            {
                var next = Candidate(ascending[place], k - 1, largest);
                if (next > best)
                    break;
                best = next;
                k--;
            }

            adjusted[order[place]] = best;
        }

        order.RaiseToRunningMaximum(adjusted);
    }

    private static Probability Candidate(Probability p, int k, ReadOnlySpan<Probability> largest) =>
        k == largest.Length ? p.Times(k) : Probability.Max(largest[k], p.Times(k));
}
