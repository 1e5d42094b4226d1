namespace MatchedSuite.Statistics.Visits;

/// <summary>Linear trend over the visits: is the mean of the subjects' least-squares slopes zero?</summary>
public static class LinearTrend
{
    /// <summary>Weights (t − t̄)/Σ(t − t̄)²: with them a row of visits gives its least-squares slope on the times.</summary>
    /// <param name="times">One time a visit, not all equal.</param>
    /// <param name="weights">Room for one weight a visit.</param>
    internal static void Weights(ReadOnlySpan<double> times, Span<double> weights)
    {
        double mean = 0, squares = 0;
        foreach (double time in times)
            mean += time / times.Length;
        for (int j = 0; j < times.Length; j++)
        {
            weights[j] = times[j] - mean;
            squares += weights[j] * weights[j];
        }

        for (int j = 0; j < times.Length; j++)
            weights[j] /= squares;
    }
}
