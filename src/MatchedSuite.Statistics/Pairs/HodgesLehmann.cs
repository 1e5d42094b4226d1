namespace MatchedSuite.Statistics.Pairs;

/// <summary>Hodges–Lehmann estimate of the centre of differences, with limits: median and order statistics of their Walsh averages.</summary>
/// <remarks>
/// The limits are the Walsh averages of rank q and M + 1 − q, with q the smallest w for which P(W ≤ w) reaches the tail
/// share under the null distribution of the signed-rank sum without ties. Where q is 0 no such average exists and the limits
/// are infinite. Source: Hodges and Lehmann (1963), Annals of Mathematical Statistics 34, 598-611.
/// </remarks>
internal static class HodgesLehmann
{
    /// <summary>Estimate and limits, all from one sorted column.</summary>
    /// <param name="sorted">At least one difference, in ascending order, zeros included.</param>
    /// <param name="quantile">q: how many Walsh averages from the end the limits stand; 0 for none.</param>
    /// <param name="scratch">Working memory.</param>
    public static (double Estimate, double Low, double High) Of(ReadOnlySpan<double> sorted, long quantile, Scratch scratch)
    {
        using var frame = scratch.Open();
        var averages = WalshAverages.Of(sorted, frame);
        double median = averages.Median();
        return quantile == 0
            ? (median, double.NegativeInfinity, double.PositiveInfinity)
            : (median, averages.Select(quantile, median), averages.Select(averages.Count + 1 - quantile, median));
    }
}
