namespace MatchedSuite.Statistics.Visits;

/// <summary>Orthonormal contrasts of k visits: visit a + 1 against the mean of the visits before it, for a = 0 … k − 2.</summary>
/// <remarks>Any other orthonormal set is a rotation of it, so totals over all contrasts do not depend on the order of the visits.</remarks>
internal static class HelmertContrasts
{
    /// <summary>Fills the weights of one contrast.</summary>
    public static void Fill(int contrast, Span<double> weights)
    {
        weights.Clear();
        double unit = 1 / Math.Sqrt((contrast + 1.0) * (contrast + 2.0));
        weights[..(contrast + 1)].Fill(-unit);
        weights[contrast + 1] = (contrast + 1) * unit;
    }

    /// <summary>All contrasts of each of many subjects; a level common to a subject's visits leaves no trace, however large.</summary>
    /// <param name="values">Subjects × k values, complete.</param>
    /// <param name="visits">k.</param>
    /// <param name="contrasts">Room for subjects × (k − 1) numbers.</param>
    /// <param name="frame">Working memory.</param>
    public static void Apply(ReadOnlySpan<double> values, int visits, Span<double> contrasts, in Scratch.Frame frame)
    {
        Span<double> shares = frame.Doubles(visits - 1), units = frame.Doubles(visits - 1);
        for (int a = 0; a < visits - 1; a++)
        {
            shares[a] = 1 / (a + 1.0);
            units[a] = Math.Sqrt((a + 1.0) / (a + 2.0));
        }

        for (int start = 0, to = 0; start < values.Length; start += visits)
        {
            double origin = values[start], sum = 0;
            for (int a = 0; a < units.Length; a++)
            {
                contrasts[to++] = (values[start + a + 1] - origin - sum * shares[a]) * units[a];
                sum += values[start + a + 1] - origin;
            }
        }
    }
}
