using CsCheck;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Statistics.Tests.Visits;

public class LinearTrendTests
{
    [Fact]
    public void Two_visits_one_apart_give_the_paired_t_test() =>
        Gen.Select(VisitTable.Complete(3, 15, 2, 2), Gen.Enum<Sides>()).Sample((table, sides) =>
        {
            var options = new TestOptions { Sides = sides };
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var expected = PairedT.Run(PairSample.Of(table.Visit(1), table.Visit(0), frame), options, scratch);
            var found = LinearTrend.Run(table.Sample(), options, scratch);
            Close.To(expected.Estimate, found.Estimate, 1e-12, 1e-14);
            Close.To(expected.StandardError, found.StandardError, 1e-12);
            Close.To(expected.Interval.Low, found.Interval.Low, 1e-10, 1e-12);
            Close.To(expected.P.Value, found.P.Value, 1e-10);
            Close.To(expected.EffectSize, found.EffectSize, 1e-11, 1e-13);
        }, iter: 300);

    [Fact]
    public void A_straight_line_in_unequal_times_is_found_to_the_last_digit()
    {
        double[] times = [0, 1, 4, 9];
        double[] slopes = [1.5, 2, 2.25, 1.75];
        double[] values = [.. slopes.SelectMany((slope, i) => times.Select(time => 100 * i + slope * time))];
        var result = LinearTrend.Run(VisitSample.Of(values, times), TestOptions.Default, new Scratch());
        Close.To(slopes.Average(), result.Estimate, 1e-13);
        Close.To(Math.Sqrt(slopes.Sum(slope => Math.Pow(slope - 1.875, 2)) / 3 / 4), result.StandardError, 1e-12);
        Assert.Equal(3, result.DegreesOfFreedom);
    }

    [Fact]
    public void Turning_time_around_negates_and_stretching_it_divides_the_slope() =>
        VisitTable.Complete(3, 12, 2, 5).Sample(table =>
        {
            var scratch = new Scratch();
            var here = LinearTrend.Run(table.Sample(), TestOptions.Default, scratch);
            var back = LinearTrend.Run(table.VisitsReversed().Sample(), TestOptions.Default, scratch);
            double[] stretched = [.. Enumerable.Range(0, table.Visits).Select(j => 3.0 + 4 * j)];
            var slow = LinearTrend.Run(VisitSample.Of(table.Values, stretched), TestOptions.Default, scratch);
            Close.To(here.Estimate, -back.Estimate, 1e-11, 1e-13);
            Close.To(here.P.Value, back.P.Value, 1e-10);
            Close.To(here.Estimate / 4, slow.Estimate, 1e-11, 1e-13);
            Close.To(here.Statistic, slow.Statistic, 1e-11, 1e-12);
            Assert.Equal(here.P.Value < 0.05, !here.Interval.Contains(0));
        }, iter: 300);

    [Fact]
    public void Equal_slopes_have_no_variation()
    {
        double[] values = [0.1, 0.2, 0.3, 1.1, 1.2, 1.3, 5.3, 5.4, 5.5];
        Assert.Equal(Outcome.NoVariation, LinearTrend.Run(VisitSample.Of(values, [0, 1, 2]), TestOptions.Default, new Scratch()).Outcome);
    }
}
