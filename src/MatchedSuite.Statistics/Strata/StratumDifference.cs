using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Strata;

/// <summary>Does a method's estimate differ between strata of sets?</summary>
/// <remarks>
/// <para>Each stratum brings its own result of one method; a stratum that was not tested, or has no usable error, takes no part. Two strata give
/// the difference of the first less the second with interval and direction; more give a test of all at once without
/// direction, where a one-sided request is remarked.</para>
/// <para>Sources: Welch (1947), Biometrika 34, 28-35; Welch (1951), Biometrika 38, 330-336; Cochran (1954), Biometrics 10, 101-129.
/// Worked through in docs/methods/strata.md.</para>
/// </remarks>
public static class StratumDifference
{
    private const int OnStack = 64;

    /// <summary>For mean differences with Student's t: Welch's t for two strata, Welch's analysis of variance for more.</summary>
    /// <remarks>
    /// Variances may differ between strata. With the paired t this is Welch's test on the strata's differences; any result with
    /// standard error and degrees of freedom will do.
    /// </remarks>
    /// <param name="strata">One result a stratum.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <returns><see cref="Outcome.TooFewSets"/> where fewer than two strata can be compared.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The confidence is not strictly between 0 and 1.</exception>
    public static TestResult OfMeans(ReadOnlySpan<TestResult> strata, TestOptions options)
    {
        Require.OpenUnitInterval(options.Confidence);
        Span<double> errors = strata.Length <= OnStack ? stackalloc double[strata.Length] : new double[strata.Length];
        for (int i = 0; i < errors.Length; i++)
            errors[i] = strata[i].DegreesOfFreedom > 0 ? Usable(strata[i], strata[i].StandardError) : double.NaN;
        var sums = Sums.Of(strata, errors);
        if (sums.Count < 2)
            return TestResult.Untested(Outcome.TooFewSets, sums.Sets, sums.Samples);
        if (sums.Count == 2)
        {
            double error = Math.Sqrt(sums.Variances);
            double df = sums.Variances * sums.Variances / sums.Fourths;
            return StudentTest.Of(sums.Difference, error, df, options) with { Sets = sums.Sets, Samples = sums.Samples };
        }

        double imbalance = 0, k = sums.Count;
        for (int i = 0; i < errors.Length; i++)
        {
            double rest = 1 - (1 / (errors[i] * errors[i] * sums.Weights));
            imbalance += double.IsNaN(rest) ? 0 : rest * rest / strata[i].DegreesOfFreedom;
        }

        double f = sums.Heterogeneity / (k - 1) / (1 + (2 * (k - 2) / ((k * k) - 1) * imbalance));
        double denominator = ((k * k) - 1) / (3 * imbalance);
        return new TestResult
        {
            Sets = sums.Sets,
            Samples = sums.Samples,
            Statistic = f,
            DegreesOfFreedom = k - 1,
            DenominatorDegreesOfFreedom = denominator,
            P = FisherF.UpperTail(f, k - 1, denominator),
            Remarks = Undirected(options),
        };
    }

    /// <summary>For any estimate with a standard error, or with an interval from which one is taken: normal for two strata, chi-squared for more.</summary>
    /// <remarks>
    /// An interval gives the error as its half-width, or the distance of its one finite end from the estimate, over the normal
    /// quantile of its tail share. Statistic: z for two strata, Σw(e − ē)² with k − 1 degrees of freedom for more, w the
    /// inverse variances.
    /// </remarks>
    /// <param name="strata">One result a stratum, all made with <paramref name="options"/>.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <returns><see cref="Outcome.TooFewSets"/> where fewer than two strata can be compared.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The confidence is not strictly between 0 and 1.</exception>
    public static TestResult OfEstimates(ReadOnlySpan<TestResult> strata, TestOptions options)
    {
        Require.OpenUnitInterval(options.Confidence);
        double quantile = StandardNormal.UpperQuantile(options.TailShare);
        Span<double> errors = strata.Length <= OnStack ? stackalloc double[strata.Length] : new double[strata.Length];
        for (int i = 0; i < errors.Length; i++)
            errors[i] = Usable(strata[i], ErrorOf(strata[i], quantile));
        var sums = Sums.Of(strata, errors);
        if (sums.Count < 2)
            return TestResult.Untested(Outcome.TooFewSets, sums.Sets, sums.Samples);
        if (sums.Count == 2)
        {
            return StudentTest.Of(sums.Difference, Math.Sqrt(sums.Variances), double.PositiveInfinity, options) with
            {
                Sets = sums.Sets,
                Samples = sums.Samples,
                DegreesOfFreedom = double.NaN,
            };
        }

        return new TestResult
        {
            Sets = sums.Sets,
            Samples = sums.Samples,
            Statistic = sums.Heterogeneity,
            DegreesOfFreedom = sums.Count - 1,
            P = ChiSquared.UpperTail(sums.Heterogeneity, sums.Count - 1),
            Remarks = Undirected(options),
        };
    }

    private static double ErrorOf(in TestResult result, double quantile)
    {
        if (double.IsFinite(result.StandardError))
            return result.StandardError;
        double down = result.Estimate - result.Interval.Low, up = result.Interval.High - result.Estimate;
        if (double.IsFinite(down) && double.IsFinite(up))
            return 0.5 * (down + up) / quantile;
        return (double.IsFinite(down) ? down : up) / quantile;
    }

    private static Remarks Undirected(TestOptions options) => options.Sides == Sides.Two ? Remarks.None : Remarks.TwoSidedOnly;

    // NaN where the stratum takes no part.
    private static double Usable(in TestResult result, double error) =>
        result.Outcome == Outcome.Tested && double.IsFinite(result.Estimate) && error > 0 && double.IsFinite(error) ? error : double.NaN;

    private readonly record struct Sums(
        int Count, int Sets, int Samples, double Difference, double Variances, double Fourths, double Weights, double Heterogeneity)
    {
        // Difference and Fourths serve two strata; the weighted mean and its squares grow by one stratum at a time.
        public static Sums Of(ReadOnlySpan<TestResult> strata, ReadOnlySpan<double> errors)
        {
            var sums = new Sums();
            double mean = 0;
            for (int i = 0; i < strata.Length; i++)
            {
                if (double.IsNaN(errors[i]))
                    continue;
                double estimate = strata[i].Estimate, variance = errors[i] * errors[i], weight = 1 / variance;
                double step = estimate - mean, weights = sums.Weights + weight;
                mean += step * weight / weights;
                sums = new Sums(
                    sums.Count + 1,
                    sums.Sets + strata[i].Sets,
                    sums.Samples + strata[i].Samples,
                    sums.Count == 0 ? estimate : sums.Difference - estimate,
                    sums.Variances + variance,
                    sums.Fourths + (variance * variance / strata[i].DegreesOfFreedom),
                    weights,
                    sums.Heterogeneity + (weight * step * (estimate - mean)));
            }

            return sums;
        }
    }
}
