using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Šidák's adjustment: familywise error rate, independent or positively orthant dependent p-values, in one step.</summary>
/// <remarks>
/// <para>Adjusted p = 1 − (1 − p)^m, m the number of tested hypotheses.</para>
/// <para>Source: Šidák (1967), J Am Stat Assoc 62, 626-633. Worked through in docs/methods/sidak.md.</para>
/// </remarks>
public static class Sidak
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
            adjusted[i] = p[i].IsMissing ? Probability.Missing : AtLeastOnce(p[i], m);
    }

    /// <summary>Probability 1 − (1 − p)^trials that an event of probability p happens in some of independent trials.</summary>
    internal static Probability AtLeastOnce(Probability p, int trials)
    {
        if (trials == 1 || p.Value >= 1)
            return p;

        // Never above trials·p, and equal to it in every digit where p is small beside one unit in the last place of 1.
        var bound = p.Times(trials);
        return p.Value * trials < 1e-18
            ? bound
            : Probability.Min(bound, Probability.Of(-LogOnePlus.Inverse(trials * LogOnePlus.Of(-p.Value))));
    }
}
