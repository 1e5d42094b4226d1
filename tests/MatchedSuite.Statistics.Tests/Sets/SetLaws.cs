using CsCheck;

namespace MatchedSuite.Statistics.Tests.Sets;

/// <summary>What must hold between the results of a method for sets on related samples.</summary>
internal static class SetLaws
{
    /// <summary>Equal outcomes, statistics and p-values; estimate, error and interval equal after multiplying by <paramref name="unit"/>.</summary>
    public static void AreEqual(TestResult before, TestResult after, double unit, double tolerance)
    {
        Assert.Equal(before.Outcome, after.Outcome);
        Assert.Equal(before.Remarks, after.Remarks);
        Assert.Equal((before.Sets, before.Samples), (after.Sets, after.Samples));
        Close(before.Estimate * unit, after.Estimate, before.StandardError * unit, tolerance);
        Close(before.StandardError * unit, after.StandardError, 0, tolerance);
        Close(before.Interval.Low * unit, after.Interval.Low, before.StandardError * unit, tolerance);
        Close(before.Interval.High * unit, after.Interval.High, before.StandardError * unit, tolerance);
        Close(before.Statistic, after.Statistic, 1, tolerance);
        Close(before.P.Value, after.P.Value, 0, 100 * tolerance);
    }

    /// <summary>Two-sided results of samples whose roles were swapped.</summary>
    public static void AreMirrored(TestResult forward, TestResult backward, double tolerance)
    {
        AreEqual(
            forward,
            backward with
            {
                Estimate = -backward.Estimate,
                Interval = new Interval(-backward.Interval.High, -backward.Interval.Low),
                Statistic = -backward.Statistic,
            },
            1,
            tolerance);
    }

    /// <summary>For every direction and several confidences: the interval excludes zero exactly when p is below 1 − confidence.</summary>
    public static void IntervalAgreesWithP(SetMethod method, Gen<DrawnSets> samples) =>
        samples.Sample(sets =>
        {
            foreach (Sides sides in Enum.GetValues<Sides>())
            {
                foreach (double confidence in new[] { 0.5, 0.8, 0.95 })
                {
                    TestResult result = sets.Run(method, new TestOptions { Sides = sides, Confidence = confidence });
                    if (result.Outcome != Outcome.Tested)
                        continue;
                    Assert.InRange(result.P.Value, 0, 1);
                    IntervalLaw.Holds(result.P.Value, result.Interval, confidence);
                    Assert.True(sides != Sides.Greater || double.IsPositiveInfinity(result.Interval.High));
                    Assert.True(sides != Sides.Less || double.IsNegativeInfinity(result.Interval.Low));
                }
            }
        });

    private static void Close(double expected, double actual, double scale, double tolerance)
    {
        if (!double.IsFinite(expected))
        {
            Assert.Equal(expected, actual);
            return;
        }

        double room = tolerance * (Math.Abs(expected) + (double.IsFinite(scale) ? scale : 1));
        Assert.True(Math.Abs(expected - actual) <= room, $"expected {expected:R}, found {actual:R}");
    }
}
