using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Tests.Distributions;

public class NoncentralTTests
{
    private static readonly double[] Degrees = [0.7, 1, 4, 19, 300, 1e5];
    private static readonly double[] Statistics = [-30, -2, -0.1, 0, 0.3, 2.5, 12, 80];
    private static readonly double[] Noncentralities = [-8, -1, -0.01, 0.5, 3, 25];

    [Fact]
    public void The_two_tails_integrated_apart_add_up_to_one()
    {
        foreach (double df in Degrees)
            foreach (double t in Statistics)
                foreach (double delta in Noncentralities)
                    Assert.Equal(1, NoncentralTIntegral.Upper(t, df, delta).Tail.Value + NoncentralTIntegral.Upper(-t, df, -delta).Tail.Value, 2e-14);
    }

    [Fact]
    public void The_integral_never_stops_on_two_sums_that_agree_by_chance()
    {
        var random = new Random(20_000);
        for (int i = 0; i < 3000; i++)
        {
            double df = Math.Exp(random.NextDouble() * 14 - 0.5);
            double t = Math.Exp(random.NextDouble() * 9 - 4.5) * (random.Next(2) * 2 - 1);
            double delta = random.NextDouble() * 40 - 20;
            double both = NoncentralTIntegral.Upper(t, df, delta).Tail.Value + NoncentralTIntegral.Upper(-t, df, -delta).Tail.Value;
            Assert.True(Math.Abs(both - 1) < 2e-14, $"df {df}, t {t}, delta {delta}: {both:R}");
        }
    }

    [Fact]
    public void A_vanishing_noncentrality_gives_the_central_t_by_the_integral_too()
    {
        foreach (double df in Degrees)
            foreach (double t in Statistics)
            {
                double central = StudentT.UpperTail(t, df).Log10;
                Assert.Equal(central, NoncentralT.UpperTail(t, df, 1e-18).Log10, 1e-12 * (1 + Math.Abs(central)));
                Assert.Equal(StudentT.UpperTail(t, df), NoncentralT.UpperTail(t, df, 0));
            }
    }

    [Fact]
    public void The_tail_at_zero_is_the_normal_tail_of_the_noncentrality_for_any_degrees_of_freedom()
    {
        foreach (double df in Degrees)
            foreach (double delta in Noncentralities)
                Assert.Equal(StandardNormal.LowerTail(delta).Log10, NoncentralT.UpperTail(0, df, delta).Log10, 1e-12);
    }

    [Fact]
    public void The_tail_grows_with_the_noncentrality_and_falls_with_t()
    {
        foreach (double df in Degrees)
            foreach (double t in Statistics)
            {
                for (int i = 1; i < Noncentralities.Length; i++)
                    Assert.True(NoncentralT.UpperTail(t, df, Noncentralities[i - 1]) <= NoncentralT.UpperTail(t, df, Noncentralities[i]));
                Assert.True(NoncentralT.LowerTail(t, df, 1.5) < NoncentralT.LowerTail(t + 0.5, df, 1.5)
                    || NoncentralT.UpperTail(t, df, 1.5) > NoncentralT.UpperTail(t + 0.5, df, 1.5));
            }
    }

    [Fact]
    public void The_noncentrality_inverts_the_tail()
    {
        foreach (double df in Degrees)
            foreach (double t in Statistics)
                foreach (double p in new[] { 1e-12, 0.005, 0.025, 0.4, 0.6, 0.975 })
                {
                    double delta = NoncentralT.Noncentrality(t, df, p);
                    Assert.True(Math.Abs(NoncentralT.UpperTail(t, df, delta).Value / p - 1) < 1e-11, $"df {df}, t {t}, p {p}, delta {delta}");
                }
    }

    [Fact]
    public void Swapping_the_roles_turns_the_limits_over()
    {
        double low = NoncentralT.Noncentrality(2.7, 14, 0.025);
        double high = NoncentralT.Noncentrality(2.7, 14, 0.975);
        Assert.Equal(-high, NoncentralT.Noncentrality(-2.7, 14, 0.025), 1e-12);
        Assert.Equal(-low, NoncentralT.Noncentrality(-2.7, 14, 0.975), 1e-12);
    }

    [Fact]
    public void The_limit_excludes_zero_exactly_when_the_t_test_is_below_the_tail_share()
    {
        foreach (double df in new[] { 4.0, 19, 300 })
        {
            double critical = StudentT.UpperQuantile(0.025, df);
            Assert.True(NoncentralT.Noncentrality(critical * (1 + 1e-9), df, 0.025) > 0);
            Assert.True(NoncentralT.Noncentrality(critical * (1 - 1e-9), df, 0.025) < 0);
        }
    }

    [Fact]
    public void Infinite_degrees_of_freedom_give_the_shifted_normal()
    {
        Assert.Equal(StandardNormal.UpperTail(1.5), NoncentralT.UpperTail(2, double.PositiveInfinity, 0.5));
        Assert.Equal(2 - StandardNormal.UpperQuantile(0.025), NoncentralT.Noncentrality(2, double.PositiveInfinity, 0.025));
    }

    [Fact]
    public void Missing_in_means_missing_out_and_impossible_arguments_throw()
    {
        Assert.True(NoncentralT.UpperTail(double.NaN, 5, 1).IsMissing);
        Assert.True(NoncentralT.LowerTail(1, 5, double.NaN).IsMissing);
        Assert.True(double.IsNaN(NoncentralT.Noncentrality(double.NaN, 5, 0.1)));
        Assert.Equal(Probability.Zero, NoncentralT.UpperTail(double.PositiveInfinity, 5, 1));
        Assert.Equal(Probability.Zero, NoncentralT.LowerTail(double.NegativeInfinity, 5, 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => NoncentralT.UpperTail(1, 0, 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => NoncentralT.UpperTail(1, 5, double.PositiveInfinity));
        Assert.Throws<ArgumentOutOfRangeException>(() => NoncentralT.Noncentrality(1, 5, 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => NoncentralT.Noncentrality(double.PositiveInfinity, 5, 0.1));
    }
}
