namespace MatchedSuite.Statistics.Pairs;

/// <summary>Mean and standard deviation (n − 1) of a column, in two passes over fixed lanes, rarely more.</summary>
/// <remarks>
/// The second pass sums the deviations from the first mean: their sum corrects the mean, and their squares, less what the
/// correction explains, give the variance. Source: Chan, Golub and LeVeque (1983), The American Statistician 37, 242-247.
/// </remarks>
public static class MeanAndDeviation
{
    // Between these sizes no square underflows or overflows in a way that costs a digit.
    private const double SmallestPlain = 1e-140;
    private const double LargestPlain = 1e150;

    // Where a poor first mean explains more of the squares than this, the subtraction would cost digits: another pass is made.
    private const double LargestExplained = 1e-3;
    private const int MostPasses = 4;

    /// <summary>Mean and standard deviation of at least two finite values.</summary>
    public static (double Mean, double Deviation) Of(ReadOnlySpan<double> values, Scratch scratch)
    {
        double size = Math.Max(FixedLanes.Largest(values), -FixedLanes.Smallest(values));
        if (size is 0 or (>= SmallestPlain and <= LargestPlain))
            return Plain(values);

        // A power of two changes no digit.
        int exponent = Math.ILogB(size);
        using var frame = scratch.Open();
        Span<double> scaled = frame.Doubles(values.Length);
        for (int i = 0; i < values.Length; i++)
            scaled[i] = Math.ScaleB(values[i], -exponent);
        var (mean, deviation) = Plain(scaled);
        return (Math.ScaleB(mean, exponent), Math.ScaleB(deviation, exponent));
    }

    private static (double Mean, double Deviation) Plain(ReadOnlySpan<double> values)
    {
        int n = values.Length;
        double mean = FixedLanes.Sum(values) / n;
        for (int pass = 1; ; pass++)
        {
            var (deviations, squares) = FixedLanes.Moments(values, mean);
            double correction = deviations / n;
            double explained = deviations * correction;
            mean += correction;
            if (explained <= LargestExplained * squares || pass == MostPasses)
                return (mean, Math.Sqrt(Math.Max(0, squares - explained) / (n - 1)));
        }
    }
}
