using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Tests.Distributions;

public class FisherFTests
{
    private static readonly (double First, double Second)[] Degrees = [(1, 1), (0.85, 12.6), (1, 1e6), (3, 30), (99, 9900), (1e4, 1e5), (20, 0.5)];

    [Fact]
    public void The_two_tails_add_up_to_one()
    {
        foreach (var (first, second) in Degrees)
            foreach (double f in new[] { 1e-6, 0.1, 0.9, 0.999999, 1, 1.000001, 1.1, 3, 50 })
                Assert.Equal(1, FisherF.UpperTail(f, first, second).Value + FisherF.LowerTail(f, first, second).Value, 2e-14);
    }

    [Fact]
    public void The_ratio_turned_over_has_the_tails_turned_over()
    {
        foreach (var (first, second) in Degrees)
            foreach (double f in new[] { 1e-6, 0.1, 0.9, 1, 1.1, 3, 50 })
            {
                double upper = FisherF.UpperTail(f, first, second).Log10;
                Assert.Equal(upper, FisherF.LowerTail(1 / f, second, first).Log10, 1e-10 + 1e-13 * Math.Abs(upper));
            }
    }

    [Fact]
    public void One_numerator_degree_of_freedom_is_the_square_of_t_and_two_have_a_closed_form()
    {
        foreach (double df in new[] { 1, 2.5, 10, 300, 1e6 })
            foreach (double t in new[] { 0.01, 0.5, 1, 2, 3, 10, 100 })
            {
                Assert.Equal(Math.Log10(2) + StudentT.UpperTail(t, df).Log10, FisherF.UpperTail(t * t, 1, df).Log10, 1e-10);
                double closed = -0.5 * df * Math.Log10(1 + 2 * t * t / df);
                Assert.Equal(closed, FisherF.UpperTail(t * t, 2, df).Log10, 1e-9);
            }
    }

    [Fact]
    public void The_quantile_inverts_the_tail()
    {
        foreach (var (first, second) in Degrees)
            foreach (double p in new[] { 1e-290, 1e-20, 0.01, 0.3, 0.5, 0.51, 0.7, 0.99 })
            {
                double f = FisherF.UpperQuantile(p, first, second);
                if (f is > 1e300 or < 1e-300)
                    continue;
                Assert.True(Math.Abs(FisherF.UpperTail(f, first, second).Value / p - 1) < 1e-10, $"df {first}, {second}, p {p}, f {f}");
            }
    }

    [Fact]
    public void Infinite_denominator_degrees_give_the_chi_squared_distribution_over_its_degrees()
    {
        Assert.Equal(ChiSquared.UpperTail(12, 4), FisherF.UpperTail(3, 4, double.PositiveInfinity));
        Assert.Equal(ChiSquared.LowerTail(12, 4), FisherF.LowerTail(3, 4, double.PositiveInfinity));
        Assert.Equal(ChiSquared.UpperQuantile(0.01, 4) / 4, FisherF.UpperQuantile(0.01, 4, double.PositiveInfinity));
    }

    [Fact]
    public void A_variance_ratio_near_the_largest_double_still_has_its_tail()
    {
        // Far out the tail is proportional to f^(−df2/2): with 4 denominator df a tenfold f lowers log10 by 2.
        double near = FisherF.UpperTail(1e307, 100, 4).Log10;
        Assert.Equal(-2, near - FisherF.UpperTail(1e306, 100, 4).Log10, 1e-9);
        Assert.Equal(-2 * 7, near - FisherF.UpperTail(1e300, 100, 4).Log10, 1e-9);
    }

    [Fact]
    public void Missing_in_means_missing_out_and_wrong_degrees_throw()
    {
        Assert.True(FisherF.UpperTail(double.NaN, 3, 5).IsMissing);
        Assert.True(FisherF.LowerTail(double.NaN, 3, 5).IsMissing);
        Assert.True(double.IsNaN(FisherF.UpperQuantile(double.NaN, 3, 5)));
        foreach (double df in new[] { 0, -2, double.NaN })
        {
            Assert.Throws<ArgumentOutOfRangeException>(() => FisherF.UpperTail(1, df, 3));
            Assert.Throws<ArgumentOutOfRangeException>(() => FisherF.LowerTail(1, 3, df));
            Assert.Throws<ArgumentOutOfRangeException>(() => FisherF.UpperQuantile(0.5, 3, df));
        }
    }
}
