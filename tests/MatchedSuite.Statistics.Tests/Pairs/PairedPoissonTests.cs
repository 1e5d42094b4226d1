using CsCheck;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class PairedPoissonTests
{
    [Fact]
    public void P_equals_the_sum_over_all_ways_to_share_the_events() =>
        Gen.Select(Gen.Int[0, 15], Gen.Int[0, 15], Gen.Double[0.2, 5], Gen.Enum<Sides>()).Where((x, y, _, _) => x + y > 0).Sample((x, y, time, sides) =>
        {
            double share = time / (1 + time);
            double Point(int k) => Binomial.Point(k, x + y, share).Value;
            double atLeast = Enumerable.Range(x, y + 1).Sum(Point), atMost = Enumerable.Range(0, x + 1).Sum(Point);
            double expected = sides switch { Sides.Greater => atLeast, Sides.Less => atMost, _ => Math.Min(1, 2 * Math.Min(atLeast, atMost)) };
            var result = PairedPoisson.Run(new EventTotals(4, x, y, 3 * time, 3), new TestOptions { Sides = sides });
            Assert.Equal(expected, result.P.Value, tolerance: 1e-12);
            Assert.Equal(Math.Log(x / time / y), result.Estimate, tolerance: 1e-12);
            Assert.Equal(x == 0 || y == 0, result.Remarks.HasFlag(Remarks.EventsInOneRole));
            Assert.Equal(x == 0 || y == 0, double.IsNaN(result.StandardError));
        });

    [Fact]
    public void Person_time_moves_the_log_rate_ratio_and_its_limits_by_its_own_ratio()
    {
        double[] index = [3, 0, 2, 5], reference = [1, 1, 0, 2];
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var pairs = PairSample.Of(index, reference, frame);
        var equal = PairedPoisson.Run(pairs, TestOptions.Default, scratch);
        Assert.Equal(equal, PairedPoisson.Run(EventTotals.Of(pairs, [2, 2, 2, 2], [2, 2, 2, 2]), TestOptions.Default));
        var timed = PairedPoisson.Run(EventTotals.Of(pairs, [1, 2, 3, 2], [1, 1, 1, 1]), TestOptions.Default);
        Assert.Equal(equal.Estimate - Math.Log(2), timed.Estimate, tolerance: 1e-14);
        Assert.Equal(equal.Interval.Low - Math.Log(2), timed.Interval.Low, tolerance: 1e-14);
        Assert.Equal(equal.Interval.High - Math.Log(2), timed.Interval.High, tolerance: 1e-14);
        Assert.Equal(10, timed.Statistic);
    }

    [Fact]
    public void No_events_are_untested_and_what_is_no_count_is_refused()
    {
        Assert.Equal(Outcome.NothingDiffers, PairedPoisson.Run(new EventTotals(3, 0, 0, 1, 1), TestOptions.Default).Outcome);
        Assert.Equal(Outcome.TooFewSets, PairedPoisson.Run(new EventTotals(0, 0, 0, 0, 0), TestOptions.Default).Outcome);
        foreach (double wrong in new[] { 0.5, -1, 1e17 })
            Assert.Throws<ArgumentException>(() => OnColumns([wrong], [1]));
        Assert.Throws<ArgumentOutOfRangeException>(() => PairedPoisson.Run(new EventTotals(1, 2, 3, 0, 1), TestOptions.Default));
    }

    private static TestResult OnColumns(double[] index, double[] reference)
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return PairedPoisson.Run(PairSample.Of(index, reference, frame), TestOptions.Default, scratch);
    }
}
