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
            : Probability.Min(bound, Probability.Of(-ExponentialMinusOne(trials * LogarithmOfOnePlus(-p.Value))));
    }

    // ln(1 + x) for -1 < x <= 0. The rounding of 1 + x is divided out again (Kahan), so small x keep all their digits.
    private static double LogarithmOfOnePlus(double x)
    {
        double sum = 1 + x;
        double kept = sum - 1;
        return kept == 0 ? x : Math.Log(sum) * (x / kept);
    }

    // exp(x) - 1 for x <= 0, by the same device.
    private static double ExponentialMinusOne(double x)
    {
        double power = Math.Exp(x);
        double less = power - 1;
        if (less == 0)
            return x;
        return power < 0.25 ? less : less * (x / Math.Log(power));
    }
}
