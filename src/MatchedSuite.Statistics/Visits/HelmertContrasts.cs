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

    /// <summary>All contrasts of one subject's visits; a level common to the visits leaves no trace, however large.</summary>
    public static void Apply(ReadOnlySpan<double> visits, Span<double> contrasts)
    {
        double origin = visits[0], sum = 0;
        for (int a = 0; a < contrasts.Length; a++)
        {
            sum += visits[a] - origin;
            contrasts[a] = (visits[a + 1] - origin - sum / (a + 1)) * Math.Sqrt((a + 1.0) / (a + 2.0));
        }
    }
}
