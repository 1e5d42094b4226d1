namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Hypotheses tested one after the other in an order fixed beforehand: familywise error rate under any dependence.</summary>
/// <remarks>
/// <para>The whole alpha goes to the first and is passed on by every rejection; the first hypothesis not rejected stops the
/// sequence. Adjusted p = the largest p-value up to and including its own place.</para>
/// <para>A missing p-value is no hypothesis and does not stop the sequence.</para>
/// <para>Source: Maurer, Hothorn and Lehmacher (1995), in Vollmar (ed.), Biometrie in der chemisch-pharmazeutischen Industrie 6;
/// Maurer and Bretz (2013), Stat Biopharm Res 5, 311-320. Worked through in docs/methods/fixed-sequence.md.</para>
/// </remarks>
public static class FixedSequence
{
    /// <summary>Adjusts one sequence.</summary>
    /// <param name="p">p-values in the order of testing.</param>
    /// <param name="adjusted">Receives the adjusted p-values in the same order; missing stays missing.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static void Adjust(ReadOnlySpan<Probability> p, Span<Probability> adjusted)
    {
        Require.OnePerHypothesis(p.Length, adjusted.Length);
        var soFar = Probability.Zero;
        for (int i = 0; i < p.Length; i++)
        {
            if (!p[i].IsMissing)
                soFar = Probability.Max(soFar, p[i]);
            adjusted[i] = p[i].IsMissing ? Probability.Missing : soFar;
        }
    }
}
