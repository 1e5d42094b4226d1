using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Tests.Distributions;

public class BetaDistributionTests
{
    private static readonly (double A, double B)[] Shapes = [(0.5, 0.5), (0.01, 3), (1, 1), (2, 5), (0.5, 1e5), (300, 0.7), (1e5, 2e5), (5e8, 5e8)];

    [Fact]
    public void The_two_tails_add_up_to_one_and_mirror_each_other()
    {
        foreach (var (a, b) in Shapes)
            foreach (double x in new[] { 0.001953125, 0.25, 0.5, 0.75, 0.9990234375, a / (a + b) })
            {
                // At the mean both sides are computed directly; elsewhere one is the complement of the other.
                Probability lower = BetaDistribution.LowerTail(x, a, b);
                Assert.Equal(1, lower.Value + BetaDistribution.UpperTail(x, a, b).Value, 2e-14);
                if (x != a / (a + b))
                    Assert.Equal(lower, BetaDistribution.UpperTail(1 - x, b, a));
            }
    }

    [Fact]
    public void Simple_shapes_follow_their_closed_forms()
    {
        foreach (double x in new[] { 1e-9, 0.1, 0.5, 0.9, 0.99 })
        {
            Assert.Equal(x, BetaDistribution.LowerTail(x, 1, 1).Value, 1e-15);
            Assert.Equal(Math.Pow(x, 7.5), BetaDistribution.LowerTail(x, 7.5, 1).Value, 1e-14);
            Assert.Equal(2 / Math.PI * Math.Asin(Math.Sqrt(x)), BetaDistribution.LowerTail(x, 0.5, 0.5).Value, 1e-14);
        }
    }

    [Fact]
    public void The_quantile_inverts_the_tail_on_both_sides()
    {
        foreach (var (a, b) in Shapes)
            foreach (double p in new[] { 1e-100, 1e-6, 0.025, 0.4, 0.5, 0.6, 0.975 })
            {
                double low = BetaDistribution.LowerQuantile(p, a, b);
                if (low > 1e-300 && low < 1 - 1e-6)
                    Assert.True(Math.Abs(BetaDistribution.LowerTail(low, a, b).Value / p - 1) < 1e-8, $"{a}, {b}, {p}: {low}");
                double high = BetaDistribution.UpperQuantile(p, b, a);
                Assert.Equal(1 - low, high, 1e-14);
            }
    }

    [Fact]
    public void The_ends_are_exact_and_missing_stays_missing()
    {
        Assert.Equal(Probability.Zero, BetaDistribution.LowerTail(0, 2, 3));
        Assert.Equal(Probability.One, BetaDistribution.LowerTail(1, 2, 3));
        Assert.Equal(Probability.One, BetaDistribution.UpperTail(-1, 2, 3));
        Assert.Equal(0, BetaDistribution.LowerQuantile(0, 2, 3));
        Assert.Equal(1, BetaDistribution.LowerQuantile(1, 2, 3));
        Assert.True(BetaDistribution.LowerTail(double.NaN, 2, 3).IsMissing);
        Assert.True(BetaDistribution.UpperTail(double.NaN, 2, 3).IsMissing);
        Assert.True(double.IsNaN(BetaDistribution.LowerQuantile(double.NaN, 2, 3)));
        Assert.Throws<ArgumentOutOfRangeException>(() => BetaDistribution.LowerTail(0.5, 0, 3));
        Assert.Throws<ArgumentOutOfRangeException>(() => BetaDistribution.UpperTail(0.5, 2, double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>(() => BetaDistribution.LowerQuantile(1.5, 2, 3));
    }
}
