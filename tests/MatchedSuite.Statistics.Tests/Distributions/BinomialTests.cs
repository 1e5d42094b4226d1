using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Tests.Distributions;

public class BinomialTests
{
    [Theory]
    [InlineData(0, 0.3)]
    [InlineData(1, 0.5)]
    [InlineData(7, 0.25)]
    [InlineData(30, 0.5)]
    [InlineData(61, 0.9)]
    public void Tails_are_the_sums_of_the_point_probabilities(long n, double p)
    {
        for (long x = 0; x <= n; x++)
        {
            double upper = 0, lower = 0;
            for (long i = n; i >= x; i--)
                upper += ByMultiplication(i, n, p);
            for (long i = 0; i <= x; i++)
                lower += ByMultiplication(i, n, p);
            Assert.True(Math.Abs(Binomial.UpperTail(x, n, p).Value / upper - 1) < 1e-13);
            Assert.True(Math.Abs(Binomial.LowerTail(x, n, p).Value / lower - 1) < 1e-13);
            Assert.True(Math.Abs(Binomial.Point(x, n, p).Value / ByMultiplication(x, n, p) - 1) < 1e-13);
        }
    }

    [Fact]
    public void A_million_trials_keep_the_digits_of_neighbouring_tails()
    {
        const long n = 1_000_000;
        foreach (long x in new long[] { 490_000, 499_000, 500_000, 500_001, 501_000, 510_000 })
        {
            double point = Binomial.Point(x, n, 0.5).Value;
            Probability upper = Binomial.UpperTail(x, n, 0.5);
            Assert.Equal(1, upper.Value + Binomial.LowerTail(x - 1, n, 0.5).Value, 1e-14);
            Assert.Equal(upper, Binomial.LowerTail(n - x, n, 0.5));
            if (x > n / 2)
                Assert.True(Math.Abs((upper.Value - Binomial.UpperTail(x + 1, n, 0.5).Value) / point - 1) < 1e-9);
        }
        // The median term by Stirling's series to four terms: √(2/(π·n))·(1 − 1/(4n) + 1/(32n²)).
        double middle = Math.Sqrt(2 / (Math.PI * n)) * (1 - 0.25 / n + 1 / (32.0 * n * n));
        Assert.True(Math.Abs(Binomial.Point(n / 2, n, 0.5).Value / middle - 1) < 1e-13);
    }

    [Theory]
    [InlineData(3, 10)]
    [InlineData(1, 1000)]
    [InlineData(999, 1000)]
    [InlineData(499_000, 1_000_000)]
    public void The_exact_limits_are_the_probabilities_whose_tails_at_the_count_are_the_share(long x, long n)
    {
        foreach (double share in new[] { 0.025, 0.05, 1e-10 })
        {
            Interval limits = Binomial.ExactLimits(x, n, share);
            Assert.True(limits.Low < (double)x / n && (double)x / n < limits.High);
            Assert.True(Math.Abs(Binomial.UpperTail(x, n, limits.Low).Value / share - 1) < 1e-9);
            // A limit within rounding of 1 no longer determines its tail; its mirror image near 0 does.
            if (limits.High < 1 - 1e-6)
                Assert.True(Math.Abs(Binomial.LowerTail(x, n, limits.High).Value / share - 1) < 1e-9);
            Interval mirrored = Binomial.ExactLimits(n - x, n, share);
            Assert.Equal(1 - limits.High, mirrored.Low, 1e-13);
            Assert.Equal(1 - limits.Low, mirrored.High, 1e-13);
        }
    }

    [Fact]
    public void No_success_and_no_failure_have_a_closed_end_and_a_closed_form()
    {
        Interval none = Binomial.ExactLimits(0, 20, 0.025);
        Interval all = Binomial.ExactLimits(20, 20, 0.025);
        Assert.Equal(0, none.Low);
        Assert.Equal(1, all.High);
        Assert.Equal(1 - Math.Pow(0.025, 1.0 / 20), none.High, 1e-14);
        Assert.Equal(Math.Pow(0.025, 1.0 / 20), all.Low, 1e-14);
    }

    [Fact]
    public void Certain_and_impossible_events_are_exact()
    {
        Assert.Equal(Probability.One, Binomial.UpperTail(0, 5, 0.2));
        Assert.Equal(Probability.Zero, Binomial.UpperTail(6, 5, 0.2));
        Assert.Equal(Probability.One, Binomial.LowerTail(5, 5, 0.2));
        Assert.Equal(Probability.Zero, Binomial.LowerTail(-1, 5, 0.2));
        Assert.Equal(Probability.One, Binomial.UpperTail(5, 5, 1));
        Assert.Equal(Probability.Zero, Binomial.UpperTail(1, 5, 0));
        Assert.Equal(Probability.One, Binomial.Point(0, 5, 0));
        Assert.Equal(Probability.Zero, Binomial.Point(4, 5, 1));
    }

    [Fact]
    public void Missing_in_means_missing_out_and_impossible_arguments_throw()
    {
        Assert.True(Binomial.UpperTail(1, 5, double.NaN).IsMissing);
        Assert.True(Binomial.LowerTail(1, 5, double.NaN).IsMissing);
        Assert.True(Binomial.Point(1, 5, double.NaN).IsMissing);
        Assert.Throws<ArgumentOutOfRangeException>(() => Binomial.UpperTail(1, -1, 0.5));
        Assert.Throws<ArgumentOutOfRangeException>(() => Binomial.UpperTail(1, 5, 1.5));
        Assert.Throws<ArgumentOutOfRangeException>(() => Binomial.ExactLimits(6, 5, 0.025));
        Assert.Throws<ArgumentOutOfRangeException>(() => Binomial.ExactLimits(0, 0, 0.025));
        Assert.Throws<ArgumentOutOfRangeException>(() => Binomial.ExactLimits(1, 5, 0));
    }

    private static double ByMultiplication(long x, long n, double p)
    {
        double product = 1;
        for (long i = 1; i <= x; i++)
            product *= (n - x + i) * p / i;
        for (long i = 0; i < n - x; i++)
            product *= 1 - p;
        return product;
    }
}
