using CsCheck;
using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class SignTestTests
{
    [Fact]
    public void Limits_are_the_innermost_order_statistics_that_the_confidence_allows() =>
        Gen.Select(Gen.Int[-40, 40].Select(i => i + 0.5).Array[1, 60], Gen.Double[0.3, 0.999]).Sample((differences, confidence) =>
        {
            var options = new TestOptions { Confidence = confidence };
            var interval = Run(differences, options).Interval;
            double[] sorted = [.. differences.Order()];
            int rank = 0;
            while (rank < sorted.Length && Binomial.LowerTail(rank, sorted.Length, 0.5).Value < options.TailShare)
                rank++;
            Assert.Equal(rank == 0 ? double.NegativeInfinity : sorted[rank - 1], interval.Low);
            Assert.Equal(rank == 0 ? double.PositiveInfinity : sorted[^rank], interval.High);
        });

    [Fact]
    public void The_estimate_is_the_median_with_its_zeros()
    {
        var result = Run([-1, 0, 0, 2, 3], TestOptions.Default);
        Assert.Equal(0, result.Estimate);
        Assert.Equal(2, result.Statistic);
        Assert.Equal(1.0 / 3, result.EffectSize, tolerance: 1e-15);
        Assert.Equal(Remarks.Zeros | Remarks.Exact | Remarks.WideAsData, result.Remarks);
        Assert.Equal(1.5, Run([-1, 1, 2, 3], TestOptions.Default).Estimate);
    }

    [Fact]
    public void All_pairs_one_way_reach_the_smallest_possible_p()
    {
        var result = Run([1, 2, 3, 4, 5, 6, 7], new TestOptions { Sides = Sides.Greater });
        Assert.Equal(1.0 / 128, result.P.Value, tolerance: 1e-16);
        Assert.Equal(1.0 / 128, result.SmallestPossibleP.Value);
    }

    private static TestResult Run(double[] differences, TestOptions options) =>
        PairMethods.Measured["sign"](differences, new double[differences.Length], options);
}
