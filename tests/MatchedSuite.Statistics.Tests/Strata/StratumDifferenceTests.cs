using CsCheck;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Statistics.Strata;
using MatchedSuite.Tests;

namespace MatchedSuite.Statistics.Tests.Strata;

public class StratumDifferenceTests
{
    private static readonly Gen<TestOptions> AnyOptions =
        Gen.Select(Gen.Enum<Sides>(), Gen.Double[0.5, 0.999], (sides, confidence) => new TestOptions { Sides = sides, Confidence = confidence });

    private static readonly Gen<TestResult> Stratum =
        Gen.Select(Gen.Double[-3, 3], Gen.Double[0.1, 2], Gen.Int[1, 40], (estimate, error, df) => new TestResult
        {
            Sets = df + 1, Samples = 2 * (df + 1), Estimate = estimate, StandardError = error, DegreesOfFreedom = df,
        });

    [Fact]
    public void Between_two_strata_the_interval_excludes_zero_exactly_when_p_says_so_and_their_order_mirrors() =>
        Gen.Select(Stratum, Stratum, AnyOptions).Sample((first, second, options) =>
        {
            var opposite = options with { Sides = options.Sides switch { Sides.Greater => Sides.Less, Sides.Less => Sides.Greater, _ => Sides.Two } };
            foreach (var (plain, turned) in new[]
            {
                (StratumDifference.OfMeans([first, second], options), StratumDifference.OfMeans([second, first], opposite)),
                (StratumDifference.OfEstimates([first, second], options), StratumDifference.OfEstimates([second, first], opposite)),
            })
            {
                Assert.Equal(first.Estimate - second.Estimate, plain.Estimate);
                IntervalLaw.Holds(plain.P.Value, plain.Interval, options.Confidence);
                Assert.Equal(plain.P.Value, turned.P.Value, tolerance: 1e-13);
                Assert.Equal(plain.Interval.Low, -turned.Interval.High, tolerance: 1e-12);
                Assert.Equal(first.Sets + second.Sets, plain.Sets);
                Assert.False(plain.Remarks.HasFlag(Remarks.TwoSidedOnly));
            }
        });

    [Fact]
    public void Of_many_strata_the_order_does_not_matter_and_an_untested_one_takes_no_part() =>
        Gen.Select(Stratum.Array[3, 8], AnyOptions).Sample((strata, options) =>
        {
            TestResult[] other = [TestResult.Untested(Outcome.NoVariation, 5, 10), .. strata.Reverse(), new() { Estimate = 3 }];
            foreach (var (plain, turned) in new[]
            {
                (StratumDifference.OfMeans(strata, options), StratumDifference.OfMeans(other, options)),
                (StratumDifference.OfEstimates(strata, options), StratumDifference.OfEstimates(other, options)),
            })
            {
                Assert.Equal(plain.Statistic, turned.Statistic, tolerance: 1e-9 * Math.Max(1, plain.Statistic));
                Assert.Equal(plain.P.Log10, turned.P.Log10, tolerance: 1e-9 * Math.Max(1, -plain.P.Log10));
                Assert.Equal(strata.Length - 1, plain.DegreesOfFreedom);
                Assert.Equal(strata.Sum(stratum => stratum.Sets), turned.Sets);
                Assert.Equal(options.Sides != Sides.Two, plain.Remarks.HasFlag(Remarks.TwoSidedOnly));
            }
        });

    [Fact]
    public void Heterogeneity_is_the_weighted_sum_of_squares_about_the_weighted_mean() =>
        Stratum.Array[3, 8].Sample(strata =>
        {
            double[] weights = [.. strata.Select(s => 1 / (s.StandardError * s.StandardError))];
            double mean = strata.Zip(weights, (s, w) => w * s.Estimate).Sum() / weights.Sum();
            double expected = strata.Zip(weights, (s, w) => w * Math.Pow(s.Estimate - mean, 2)).Sum();
            Assert.Equal(expected, StratumDifference.OfEstimates(strata, TestOptions.Default).Statistic, tolerance: 1e-9 * Math.Max(1, expected));
        });

    [Fact]
    public void Without_a_standard_error_the_interval_gives_one()
    {
        double z = StandardNormal.UpperQuantile(0.025), oneSided = StandardNormal.UpperQuantile(0.05);
        TestResult[] two = [new() { Estimate = 3, Interval = new(1, 5) }, new() { Estimate = 0, StandardError = 1 }];
        Assert.Equal(Math.Sqrt((4 / z / z) + 1), StratumDifference.OfEstimates(two, TestOptions.Default).StandardError, tolerance: 1e-14);
        var greater = new TestOptions { Sides = Sides.Greater };
        TestResult[] one = [new() { Estimate = 3, Interval = new(1, double.PositiveInfinity) }, new() { Estimate = 0, StandardError = 1 }];
        Assert.Equal(Math.Sqrt((4 / oneSided / oneSided) + 1), StratumDifference.OfEstimates(one, greater).StandardError, tolerance: 1e-14);
        TestResult[] none = [new() { Estimate = 3, Interval = new(double.NegativeInfinity, double.PositiveInfinity) }, new() { Estimate = 0, StandardError = 1 }];
        Assert.Equal(Outcome.TooFewSets, StratumDifference.OfEstimates(none, TestOptions.Default).Outcome);
    }

    [Fact]
    public void Discordance_equals_the_enumeration_of_all_tables_with_the_same_margins() =>
        Gen.Select(Gen.Int[0, 8], Gen.Int[0, 8], Gen.Int[0, 8], Gen.Int[0, 8], Gen.Enum<Sides>()).Sample((b, c, otherB, otherC, sides) =>
        {
            var result = DiscordanceDifference.Run(new PairedTable(1, b, c, 1), new PairedTable(1, otherB, otherC, 1), sides);
            if (b + c == 0 || otherB + otherC == 0 || b + otherB == 0 || c + otherC == 0)
            {
                Assert.Equal(Outcome.NothingDiffers, result.Outcome);
                return;
            }

            double Ways(int x) => Choose(b + otherB, x) * Choose(c + otherC, b + c - x);
            int[] possible = [.. Enumerable.Range(0, b + c + 1).Where(x => x <= b + otherB && b + c - x <= c + otherC)];
            double all = possible.Sum(Ways), atLeast = possible.Where(x => x >= b).Sum(Ways) / all, atMost = possible.Where(x => x <= b).Sum(Ways) / all;
            double expected = sides switch { Sides.Greater => atLeast, Sides.Less => atMost, _ => Math.Min(1, 2 * Math.Min(atLeast, atMost)) };
            Assert.Equal(expected, result.P.Value, tolerance: 1e-12);
            Assert.Equal(b * c * otherB * otherC == 0, double.IsNaN(result.StandardError));
        });

    [Fact]
    public void Nothing_is_allocated()
    {
        TestResult[] strata = [.. Enumerable.Range(1, 3).Select(i => new TestResult { Estimate = i, StandardError = 1, DegreesOfFreedom = 5 * i })];
        Assert.Equal(0, Allocated.Least(() =>
        {
            StratumDifference.OfMeans(strata, TestOptions.Default);
            StratumDifference.OfEstimates(strata, TestOptions.Default);
        }));
    }

    private static double Choose(int n, int k) => k < 0 || k > n ? 0 : Math.Round(Math.Exp(
        LogGamma.LogFactorial(n) - LogGamma.LogFactorial(k) - LogGamma.LogFactorial(n - k)));
}
