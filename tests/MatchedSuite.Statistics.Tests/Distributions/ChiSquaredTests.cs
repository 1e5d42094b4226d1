using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Tests.Distributions;

public class ChiSquaredTests
{
    private static readonly double[] Degrees = [0.1, 0.5, 1, 2, 3.7, 10, 100, 1234.5, 1e6];

    [Fact]
    public void The_two_tails_add_up_to_one_and_the_upper_falls()
    {
        foreach (double df in Degrees)
        {
            Probability last = Probability.One;
            foreach (double share in new[] { 0.5, 0.9, 0.99, 0.999, 1, 1.001, 1.01, 1.1, 2 })
            {
                Probability upper = ChiSquared.UpperTail(df * share, df);
                Assert.Equal(1, upper.Value + ChiSquared.LowerTail(df * share, df).Value, 1e-15);
                Assert.True(upper < last || upper.Value == 1);
                last = upper;
            }
        }
    }

    [Fact]
    public void One_degree_of_freedom_is_the_square_of_a_normal_and_two_are_exponential()
    {
        foreach (double z in new[] { 0.01, 0.3, 1, 2, 5, 20, 37, 100 })
        {
            Assert.Equal(Math.Log10(2) + StandardNormal.UpperTail(z).Log10, ChiSquared.UpperTail(z * z, 1).Log10, 1e-11);
            Assert.Equal(-0.5 * z * z / Math.Log(10), ChiSquared.UpperTail(z * z, 2).Log10, 1e-11);
        }
    }

    [Fact]
    public void The_quantile_inverts_the_tail()
    {
        foreach (double df in Degrees)
        {
            foreach (double p in new[] { 1e-300, 1e-20, 0.01, 0.3, 0.5, 0.51, 0.7, 0.99, 1 - 1e-9 })
            {
                double x = ChiSquared.UpperQuantile(p, df);
                if (x < 1e-300)
                    continue;
                Assert.True(Math.Abs(ChiSquared.UpperTail(x, df).Value / p - 1) < 1e-11, $"df {df}, p {p}, x {x}");
            }
        }
    }

    [Fact]
    public void The_ends_are_exact_and_below_zero_nothing_lies()
    {
        Assert.Equal(Probability.One, ChiSquared.UpperTail(0, 3));
        Assert.Equal(Probability.One, ChiSquared.UpperTail(-1, 3));
        Assert.Equal(Probability.Zero, ChiSquared.LowerTail(-1, 3));
        Assert.Equal(Probability.Zero, ChiSquared.UpperTail(double.PositiveInfinity, 3));
        Assert.Equal(0, ChiSquared.UpperQuantile(1, 3));
        Assert.Equal(double.PositiveInfinity, ChiSquared.UpperQuantile(0, 3));
    }

    [Fact]
    public void Missing_in_means_missing_out_and_wrong_degrees_throw()
    {
        Assert.True(ChiSquared.UpperTail(double.NaN, 3).IsMissing);
        Assert.True(ChiSquared.LowerTail(double.NaN, 3).IsMissing);
        Assert.True(double.IsNaN(ChiSquared.UpperQuantile(double.NaN, 3)));
        foreach (double df in new[] { 0, -2, double.NaN, double.PositiveInfinity })
        {
            Assert.Throws<ArgumentOutOfRangeException>(() => ChiSquared.UpperTail(1, df));
            Assert.Throws<ArgumentOutOfRangeException>(() => ChiSquared.LowerTail(1, df));
            Assert.Throws<ArgumentOutOfRangeException>(() => ChiSquared.UpperQuantile(0.5, df));
        }
    }
}
