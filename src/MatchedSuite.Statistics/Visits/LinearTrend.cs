using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Visits;

/// <summary>Linear trend over the visits: is the mean of the subjects' least-squares slopes zero?</summary>
/// <remarks>
/// <para>Only subjects seen at every visit enter. Each subject's values give one slope on the times of the visits, equally
/// spaced or not; the slopes are tested by Student's t with n − 1 degrees of freedom.</para>
/// <para>Units: estimate, error and interval in endpoint units per unit of time; effect size is the mean slope over its
/// standard deviation between subjects, times Hedges' correction.</para>
/// <para>Assumes independent subjects and near-normal slopes; nothing about the variances of the visits.</para>
/// <para>Source: the linear contrast of Fisher (1925), Statistical Methods for Research Workers, tested by Student (1908).
/// Worked through in docs/methods/linear-trend.md.</para>
/// </remarks>
public static class LinearTrend
{
    /// <summary>Tests one endpoint.</summary>
    public static TestResult Run(in VisitSample sample, TestOptions options, Scratch scratch)
    {
        ArgumentNullException.ThrowIfNull(options);
        using var frame = scratch.Open();
        var complete = sample.Complete(frame);
        int n = complete.Subjects;
        if (n < 2)
            return TestResult.Untested(Outcome.TooFewSets, n, complete.Values.Length);
        Span<double> weights = frame.Doubles(complete.Visits), slopes = frame.Doubles(n);
        Weights(complete.Times, weights);
        double largest = 0;
        for (int i = 0; i < n; i++)
            slopes[i] = Slope(complete.Subject(i), weights, ref largest);

        var (mean, deviation) = MeanAndDeviation.Of(slopes, scratch);
        if (deviation <= StudentTest.RoundingOf(largest) * SumOfSizes(weights))
            return TestResult.Untested(Outcome.NoVariation, n, complete.Values.Length);
        return StudentTest.Of(mean, deviation / Math.Sqrt(n), n - 1, options) with
        {
            Sets = n,
            Samples = complete.Values.Length,
            EffectSize = HedgesCorrection.Factor(n - 1) * mean / deviation,
        };
    }

    /// <summary>Weights (t − t̄)/Σ(t − t̄)²: with them a row of visits gives its least-squares slope on the times.</summary>
    /// <param name="times">One time a visit, not all equal.</param>
    /// <param name="weights">Room for one weight a visit.</param>
    internal static void Weights(ReadOnlySpan<double> times, Span<double> weights)
    {
        double mean = FixedLanes.Sum(times) / times.Length, squares = 0;
        for (int j = 0; j < times.Length; j++)
        {
            weights[j] = times[j] - mean;
            squares += weights[j] * weights[j];
        }

        for (int j = 0; j < times.Length; j++)
            weights[j] /= squares;
    }

    // The weights sum to 0, so the level of the first visit can go before it costs digits.
    private static double Slope(ReadOnlySpan<double> visits, ReadOnlySpan<double> weights, ref double largest)
    {
        double sum = 0;
        for (int j = 0; j < visits.Length; j++)
        {
            sum += weights[j] * (visits[j] - visits[0]);
            largest = Math.Max(largest, Math.Abs(visits[j]));
        }

        return sum;
    }

    private static double SumOfSizes(ReadOnlySpan<double> weights)
    {
        double sum = 0;
        foreach (double weight in weights)
            sum += Math.Abs(weight);
        return sum;
    }
}
