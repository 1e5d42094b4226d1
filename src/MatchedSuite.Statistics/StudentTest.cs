using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics;

/// <summary>The test and interval of an estimate whose standard error is worth so many degrees of freedom.</summary>
internal static class StudentTest
{
    // A spread of a few units in the last place of the values is rounding, not variation.
    private const double RoundingUnits = 8 * 2.220446049250313e-16;

    /// <summary>The spread that rounding alone may leave in combinations of values of at most this size.</summary>
    public static double RoundingOf(double largestMagnitude) => RoundingUnits * largestMagnitude;

    /// <summary>Estimate, error, t, p and an interval that points as the test points; counts are the caller's.</summary>
    public static TestResult Of(double estimate, double error, double df, TestOptions options)
    {
        double t = estimate / error;
        double reach = error * Quantile(options.TailShare, df);
        return new TestResult
        {
            Estimate = estimate,
            StandardError = error,
            Interval = Interval.Pointing(estimate - reach, estimate + reach, options.Sides),
            Statistic = t,
            DegreesOfFreedom = df,
            P = Tails.ForSides(options.Sides, StudentT.LowerTail(t, df), StudentT.UpperTail(t, df)),
        };
    }

    // Whole degrees of freedom recur from endpoint to endpoint and are kept.
    private static double Quantile(double tailShare, double df) =>
        df == Math.Floor(df) && df <= int.MaxValue ? StudentTQuantiles.Upper(tailShare, (int)df) : StudentT.UpperQuantile(tailShare, df);
}
