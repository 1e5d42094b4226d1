namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>The step-up adjustment of Benjamini and Hochberg with weights fixed before the data were seen: false discovery rate.</summary>
/// <remarks>
/// <para>Benjamini and Hochberg on p/w, the weights scaled to mean 1 over the tested hypotheses.</para>
/// <para>Source: Genovese, Roeder and Wasserman (2006), Biometrika 93, 509-524. Worked through in docs/methods/weighted-bh.md.</para>
/// </remarks>
public static class WeightedBenjaminiHochberg
{
    /// <summary>Adjusts one family.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted, nor is their weight.</param>
    /// <param name="weights">One finite weight a hypothesis, 0 or more; only ratios matter. Weight 0 is never rejected.</param>
    /// <param name="adjusted">Receives the adjusted p-values in the same order; missing stays missing.</param>
    /// <exception cref="ArgumentException">The lengths differ, or a weight is negative or not finite.</exception>
    public static void Adjust(ReadOnlySpan<Probability> p, ReadOnlySpan<double> weights, Span<Probability> adjusted)
    {
        Require.OnePerHypothesis(p.Length, weights.Length);
        Require.Weights(weights);
        double mean = MeanWeight(p, weights);
        var weighted = new Probability[p.Length];
        for (int i = 0; i < p.Length; i++)
            weighted[i] = p[i].IsMissing || weights[i] > 0 ? p[i].Times(mean / weights[i]) : Probability.One;
        BenjaminiHochberg.Adjust(weighted, adjusted);
    }

    private static double MeanWeight(ReadOnlySpan<Probability> p, ReadOnlySpan<double> weights)
    {
        double sum = 0;
        int tested = 0;
        for (int i = 0; i < p.Length; i++)
        {
            if (p[i].IsMissing)
                continue;
            sum += weights[i];
            tested++;
        }

        return sum / tested;
    }
}
