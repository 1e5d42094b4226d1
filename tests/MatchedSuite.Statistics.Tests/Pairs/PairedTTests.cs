using CsCheck;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class PairedTTests
{
    private static readonly double[] Drug1 = [0.7, -1.6, -0.2, -1.2, -0.1, 3.4, 3.7, 0.8, 0.0, 2.0];
    private static readonly double[] Drug2 = [1.9, 0.8, 1.1, 0.1, -0.1, 4.4, 5.5, 1.6, 4.6, 3.4];

    [Theory]
    [InlineData(1e200)]
    [InlineData(1e300)]
    [InlineData(1e-200)]
    [InlineData(1e-290)]
    public void Units_near_the_ends_of_the_doubles_leave_t_and_p_alone(double unit)
    {
        var plain = Run(Drug2, Drug1);
        var scaled = Run([.. Drug2.Select(v => v * unit)], [.. Drug1.Select(v => v * unit)]);
        Assert.Equal(plain.Statistic, scaled.Statistic, tolerance: 1e-13);
        Assert.Equal(plain.P.Value, scaled.P.Value, tolerance: 1e-15);
        Assert.Equal(plain.Estimate, scaled.Estimate / unit, tolerance: 1e-13);
    }

    [Fact]
    public void An_offset_of_1e9_on_values_with_halves_loses_nothing()
    {
        double[] index = [0.5, 1.5, 2, 4.5, 3], reference = [0, 0.5, 2.5, 1, 1];
        var plain = Run(index, reference);
        var offset = Run([.. index.Select(v => v + 1e9)], [.. reference.Select(v => v + 1e9)]);
        Assert.Equal(plain, offset);
        // The offset in the differences themselves: mean exact, deviation that of the small numbers.
        var shifted = Run([.. index.Select(v => v + 1e9)], reference);
        Assert.Equal(1e9 + plain.Estimate, shifted.Estimate);
        Assert.Equal(plain.StandardError, shifted.StandardError, tolerance: 1e-15);
    }

    [Fact]
    public void A_spread_of_a_few_billionths_on_many_large_differences_keeps_its_digits()
    {
        const int n = 100_000;
        double half = Math.ScaleB(1, -28);
        var result = Run([.. Enumerable.Range(0, n).Select(i => 1e6 + (i % 2 == 0 ? half : -half))], new double[n]);
        Assert.Equal(1e6, result.Estimate);
        Assert.Equal(half / Math.Sqrt(n - 1), result.StandardError, tolerance: 1e-12 * result.StandardError);
    }

    [Fact]
    public void Differences_equal_as_decimals_have_no_variation()
    {
        // 0.1 everywhere, on values of very different size.
        var result = Run([0.3, 5.1, 1000.1, 2e6 + 0.1, 0.1], [0.2, 5, 1000, 2e6, 0]);
        Assert.Equal(Outcome.NoVariation, result.Outcome);
        Assert.True(result.Remarks.HasFlag(Remarks.NoVariation));
        Assert.True(result.P.IsMissing);
        Assert.Equal(Outcome.NoVariation, Run([1.0, 2, 3], [1.0, 2, 3]).Outcome);
    }

    [Fact]
    public void A_small_true_spread_beside_one_large_value_is_variation() =>
        Assert.Equal(Outcome.Tested, Run([0.3, 5.1001, 2e9 + 0.1], [0.2, 5, 2e9]).Outcome);

    [Fact]
    public void Equality_by_decimals_is_that_of_all_pairs_of_differences() =>
        Gen.Select(Gen.Int[0, 2], Gen.Int[0, 16], Gen.Int[0, 3], (tenths, magnitude, noise) =>
            (Index: Math.Pow(10, magnitude) + (tenths / 10.0) + (noise * 1e-5), Reference: Math.Pow(10, magnitude))).Array[2, 6]
        .Sample(pairs =>
        {
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var sample = PairSample.Of([.. pairs.Select(p => p.Index)], [.. pairs.Select(p => p.Reference)], frame);
            bool allEqual = true;
            for (int i = 0; i < sample.Count; i++)
            {
                for (int j = 0; j < sample.Count; j++)
                {
                    allEqual &= Math.Abs(sample.Differences[i] - sample.Differences[j])
                        <= Math.Max(sample.Roundings[i], sample.Roundings[j]);
                }
            }

            Assert.Equal(allEqual, DecimalTies.AllEqual(sample, scratch));
        });

    [Fact]
    public void Two_pairs_are_tested_without_effect_size_and_one_is_not_tested()
    {
        var two = Run([1.0, 3.0], [0.0, 0.0]);
        Assert.Equal(2, two.Statistic, tolerance: 1e-15);
        Assert.True(double.IsNaN(two.EffectSize));
        Assert.Equal(Outcome.TooFewSets, Run([1.0], [0.0]).Outcome);
    }

    [Theory]
    [InlineData(1)]
    [InlineData(17)]
    [InlineData(4095)]
    [InlineData(5000)]
    public void A_kept_quantile_is_the_quantile(int df)
    {
        for (int share = 1; share <= 40; share++)
        {
            double tailShare = share / 80.0;
            for (int time = 0; time < 3; time++)
                Assert.Equal(StudentT.UpperQuantile(tailShare, df), StudentTQuantiles.Upper(tailShare, df));
        }
    }

    [Fact]
    public void Hedges_factor_has_its_closed_forms()
    {
        Assert.True(double.IsNaN(HedgesCorrection.Factor(1)));
        Assert.Equal(1 / Math.Sqrt(Math.PI), HedgesCorrection.Factor(2), tolerance: 1e-15);
        Assert.Equal(Math.Sqrt(Math.PI / 6), HedgesCorrection.Factor(3), tolerance: 1e-15);
        // J(df + 2) = J(df) · df/(df − 1) · √(df/(df + 2)).
        for (double df = 2; df < 300; df++)
        {
            double next = HedgesCorrection.Factor((int)df) * df / (df - 1) * Math.Sqrt(df / (df + 2));
            Assert.Equal(next, HedgesCorrection.Factor((int)df + 2), tolerance: 1e-14);
        }
    }

    private static TestResult Run(double[] index, double[] reference) =>
        PairMethods.Measured["paired-t"](index, reference, TestOptions.Default);
}
