using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Arms;

/// <summary>Hodges–Lehmann estimate of the shift between two columns with limits: median and order statistics of all differences between them.</summary>
/// <remarks>
/// The limits are the differences of rank q and M + 1 − q; where q is 0 no such difference exists and they are infinite.
/// Differences are selected, never listed. Source: Hodges &amp; Lehmann (1963), Annals of Mathematical Statistics 34, 598-611.
/// </remarks>
internal static class ShiftOfChanges
{
    // For normal columns the differences near their median stand about this many interquartile ranges apart, times their number.
    private const double CentralSpacing = 2.6;

    /// <summary>Estimate and limits of index minus reference.</summary>
    /// <param name="index">At least one value, ascending.</param>
    /// <param name="reference">At least one value, ascending.</param>
    /// <param name="quantile">q: how many differences from the end the limits stand; 0 for none.</param>
    /// <param name="scratch">Working memory.</param>
    public static (double Estimate, double Low, double High) Of(
        ReadOnlySpan<double> index, ReadOnlySpan<double> reference, long quantile, Scratch scratch)
    {
        using var frame = scratch.Open();
        Span<double> negative = frame.Doubles(reference.Length);
        for (int j = 0; j < reference.Length; j++)
            negative[j] = -reference[reference.Length - 1 - j];
        var selection = new PairwiseSumSelection(index, negative, frame);
        long count = (long)index.Length * reference.Length;
        // First guesses only: they set how soon a selection ends, never what it gives.
        double centre = Middle(index) - Middle(reference);
        double spacing = CentralSpacing * Math.Max(MiddleHalf(index), MiddleHalf(reference)) / count;
        double lower = selection.Select((count + 1) / 2, centre, spacing);
        double median = count % 2 == 1 ? lower : 0.5 * lower + 0.5 * selection.Select(count / 2 + 1, lower, spacing);
        if (quantile == 0)
            return (median, double.NegativeInfinity, double.PositiveInfinity);
        double reach = spacing * (0.5 * (count + 1) - quantile);
        return (median, selection.Select(quantile, median - reach, spacing), selection.Select(count + 1 - quantile, median + reach, spacing));
    }

    private static double Middle(ReadOnlySpan<double> sorted) => sorted[sorted.Length / 2];

    private static double MiddleHalf(ReadOnlySpan<double> sorted) => sorted[sorted.Length - 1 - sorted.Length / 4] - sorted[sorted.Length / 4];
}
