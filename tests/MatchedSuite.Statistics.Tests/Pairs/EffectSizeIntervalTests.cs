using CsCheck;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class EffectSizeIntervalTests
{
    [Fact]
    public void The_observed_t_is_at_the_tail_share_under_either_limit_and_zero_is_outside_exactly_when_p_is_small() =>
        Gen.Select(Gen.Double[-8, 8], Gen.Int[2, 200], Gen.Double[0.5, 0.99]).Sample((t, pairs, confidence) =>
        {
            var options = new TestOptions { Confidence = confidence };
            var interval = EffectSizeInterval.Of(t, pairs, options);
            double df = pairs - 1, root = Math.Sqrt(pairs);
            Assert.Equal(options.TailShare, NoncentralT.UpperTail(t, df, interval.Low * root).Value, tolerance: 1e-10);
            Assert.Equal(options.TailShare, NoncentralT.LowerTail(t, df, interval.High * root).Value, tolerance: 1e-10);
            double p = 2 * StudentT.UpperTail(Math.Abs(t), df).Value;
            IntervalLaw.Holds(p, interval, confidence);
            var mirrored = EffectSizeInterval.Of(-t, pairs, options);
            Assert.Equal(interval.Low, -mirrored.High, tolerance: 1e-9);
        });

    [Fact]
    public void One_sided_limits_point_as_the_test_does_and_no_t_gives_no_interval()
    {
        var greater = EffectSizeInterval.Of(2, 10, new TestOptions { Sides = Sides.Greater, Confidence = 0.975 });
        var less = EffectSizeInterval.Of(2, 10, new TestOptions { Sides = Sides.Less, Confidence = 0.975 });
        var two = EffectSizeInterval.Of(2, 10, TestOptions.Default);
        Assert.Equal(two.Low, greater.Low, tolerance: 1e-12);
        Assert.Equal(double.PositiveInfinity, greater.High);
        Assert.Equal(two.High, less.High, tolerance: 1e-12);
        Assert.Equal(double.NegativeInfinity, less.Low);
        Assert.Equal(Interval.None, EffectSizeInterval.Of(double.NaN, 10, TestOptions.Default));
        Assert.Throws<ArgumentOutOfRangeException>(() => EffectSizeInterval.Of(1, 1, TestOptions.Default));
    }
}
