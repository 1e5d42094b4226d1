using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Tests;

namespace MatchedSuite.Statistics.Tests.Distributions;

public class StudentTTests
{
    private static readonly double[] Degrees = [0.3, 1, 2, 2.5, 4, 7.25, 30, 119, 1e3, 1e6, 1e9, 1e14, double.PositiveInfinity];
    private static readonly double[] Statistics = [0, 1e-9, 0.1, 0.5, 1, 1.7, 2, 2.2360679774997896, 2.3, 3, 5, 10, 40, 200];

    [Fact]
    public void The_two_tails_add_up_to_one()
    {
        foreach (double df in Degrees)
            foreach (double t in Statistics)
                Assert.Equal(1, StudentT.UpperTail(t, df).Value + StudentT.LowerTail(t, df).Value, 1e-15);
    }

    [Fact]
    public void The_upper_tail_at_minus_t_is_the_lower_tail_at_t()
    {
        foreach (double df in Degrees)
            foreach (double t in Statistics)
                Assert.Equal(StudentT.UpperTail(-t, df), StudentT.LowerTail(t, df));
    }

    [Fact]
    public void The_tail_falls_as_t_grows_and_no_step_shows_where_one_formula_hands_over_to_the_other()
    {
        foreach (double df in Degrees)
        {
            double last = 0.5;
            for (double t = 0.01; t < 8; t += 0.01)
            {
                double tail = StudentT.UpperTail(t, df).Value;
                Assert.True(tail < last, $"df {df}, t {t}: {tail} is not below {last}");
                last = tail;
            }
        }
        foreach (double df in Degrees)
        {
            double ratio = Math.Min(Math.Sqrt(5), Math.Sqrt(0.5 * df));
            double below = StudentT.UpperTail(ratio * (1 - 1e-14), df).Value;
            double above = StudentT.UpperTail(ratio * (1 + 1e-14), df).Value;
            Assert.True(Math.Abs(above / below - 1) < 3e-13, $"df {df}: {below} then {above}");
        }
    }

    [Fact]
    public void One_and_two_degrees_of_freedom_follow_their_closed_forms()
    {
        foreach (double t in Statistics)
        {
            double cauchy = t > 1 ? Math.Atan(1 / t) / Math.PI : 0.5 - Math.Atan(t) / Math.PI;
            Assert.True(Math.Abs(StudentT.UpperTail(t, 1).Value / cauchy - 1) < 1e-14);
            double root = Math.Sqrt(2 + t * t);
            Assert.True(Math.Abs(StudentT.UpperTail(t, 2).Value / (1 / (root * (root + t))) - 1) < 1e-14);
        }
    }

    [Fact]
    public void Very_many_degrees_of_freedom_approach_the_normal_tail_at_the_known_rate()
    {
        // The tail exceeds the normal one by the density times (t³ + t)/(4 df): Fisher (1925), Metron 5, 109-112.
        foreach (double t in new[] { 0.5, 1, 2, 3, 6, 20, 35 })
        {
            double normal = StandardNormal.UpperTail(t).Value;
            double expected = normal + StandardNormal.Density(t) * (t * t * t + t) / (4 * 1e13);
            Assert.True(Math.Abs(StudentT.UpperTail(t, 1e13).Value / expected - 1) < 5e-13);
        }
    }

    [Fact]
    public void The_quantile_inverts_the_tail_far_out_and_near_the_centre()
    {
        foreach (double df in Degrees)
        {
            foreach (double p in new[] { 0.4999999, 0.49, 0.31, 0.3, 0.29, 0.2, 0.1, 0.025, 1e-3, 1e-8, 1e-50, 1e-280 })
            {
                double t = StudentT.UpperQuantile(p, df);
                if (double.IsPositiveInfinity(t))
                {
                    Assert.True(df < 1 && p < 1e-49);
                    continue;
                }
                Assert.True(Math.Abs(StudentT.UpperTail(t, df).Value / p - 1) < 2e-12, $"df {df}, p {p}, t {t}");
                if (p > 0.01)
                    Assert.Equal(-t, StudentT.UpperQuantile(1 - p, df), t * 2e-9);
            }
            foreach (double log10 in new[] { -400.0, -1000, -20000 })
            {
                double t = StudentT.UpperQuantile(Probability.FromLog10(log10), df);
                if (t < 1e300)
                    Assert.Equal(log10, StudentT.UpperTail(t, df).Log10, 1e-9);
            }
        }
    }

    [Fact]
    public void The_ends_of_the_quantile_are_infinite_and_its_middle_is_zero()
    {
        Assert.Equal(0, StudentT.UpperQuantile(0.5, 7));
        Assert.Equal(double.PositiveInfinity, StudentT.UpperQuantile(0, 7));
        Assert.Equal(double.NegativeInfinity, StudentT.UpperQuantile(1, 7));
        Assert.Equal(Probability.Zero, StudentT.UpperTail(double.PositiveInfinity, 7));
        Assert.Equal(Probability.One, StudentT.UpperTail(double.NegativeInfinity, 7));
    }

    [Fact]
    public void Statistics_near_the_largest_double_still_have_a_tail()
    {
        // With 3 df the far tail is proportional to t^-3: a thousandfold t lowers log10 by 9.
        double near = StudentT.UpperTail(1e300, 3).Log10;
        Assert.Equal(-9, near - StudentT.UpperTail(1e297, 3).Log10, 1e-9);
        Assert.Equal(1e300, StudentT.UpperQuantile(Probability.FromLog10(near), 3), 1e300 * 1e-11);
    }

    [Fact]
    public void A_missing_statistic_has_a_missing_tail()
    {
        Assert.True(StudentT.UpperTail(double.NaN, 5).IsMissing);
        Assert.True(StudentT.LowerTail(double.NaN, 5).IsMissing);
        Assert.True(double.IsNaN(StudentT.UpperQuantile(double.NaN, 5)));
        Assert.True(double.IsNaN(StudentT.UpperQuantile(Probability.Missing, 5)));
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-1)]
    [InlineData(double.NaN)]
    public void Degrees_of_freedom_that_are_none_throw(double df)
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => StudentT.UpperTail(1, df));
        Assert.Throws<ArgumentOutOfRangeException>(() => StudentT.LowerTail(1, df));
        Assert.Throws<ArgumentOutOfRangeException>(() => StudentT.UpperQuantile(0.1, df));
    }

    [Theory]
    [InlineData(-0.1)]
    [InlineData(1.1)]
    public void A_probability_outside_the_unit_interval_throws(double p) =>
        Assert.Throws<ArgumentOutOfRangeException>(() => StudentT.UpperQuantile(p, 5));

    [Fact]
    public void A_tail_and_a_quantile_allocate_nothing()
    {
        double sum = 0;
        Assert.Equal(0, Allocated.Least(() =>
        {
            for (int i = 1; i < 1000; i++)
                sum += StudentT.UpperTail(0.01 * i, 9).Value + StudentT.UpperQuantile(1.0 / i, 9);
        }));
        Assert.False(double.IsNaN(sum));
    }
}
