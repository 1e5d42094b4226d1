using CsCheck;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Statistics.Randomness;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class ModeratedPairedTTests
{
    [Fact]
    public void The_prior_that_made_many_variances_is_found_again()
    {
        const int Endpoints = 20_000;
        const double PriorDf = 6, PriorVariance = 2.5, Df = 11;
        var variances = new double[Endpoints];
        for (int i = 0; i < Endpoints; i++)
        {
            // σ² = d0·s0²/χ²(d0), s² = σ²·χ²(df)/df, by quantiles of uniform numbers.
            double inverse = ChiSquared.UpperQuantile(Uniform(i, 0), PriorDf);
            variances[i] = PriorDf * PriorVariance / inverse * ChiSquared.UpperQuantile(Uniform(i, 1), Df) / Df;
        }

        var prior = VariancePrior.Fit(variances, [.. Enumerable.Repeat(Df, Endpoints)])!.Value;
        // Moments of 20,000 logarithms: d0 within some per cent.
        Assert.Equal(PriorDf, prior.DegreesOfFreedom, tolerance: 0.4);
        Assert.Equal(PriorVariance, prior.Variance, tolerance: 0.1);
    }

    [Fact]
    public void A_change_of_unit_scales_the_common_variance_alone_and_missing_ones_do_not_count() =>
        Gen.Select(Gen.Double[0.1, 9].Array[10, 40], Gen.Double[1e-6, 1e6]).Sample((variances, factor) =>
        {
            double[] df = [.. variances.Select((_, i) => 3.0 + (i % 4))];
            var plain = VariancePrior.Fit(variances, df)!.Value;
            var scaled = VariancePrior.Fit([double.NaN, .. variances.Select(v => v * factor)], [0, .. df])!.Value;
            Assert.Equal(1, scaled.Variance / plain.Variance / factor, tolerance: 1e-9);
            if (double.IsPositiveInfinity(plain.DegreesOfFreedom))
                Assert.True(scaled.DegreesOfFreedom > 1e7);
            else if (plain.DegreesOfFreedom < 1e4)
                Assert.Equal(1, scaled.DegreesOfFreedom / plain.DegreesOfFreedom, tolerance: 1e-6);
        });

    [Fact]
    public void Nine_endpoints_are_too_few_to_learn_from()
    {
        Assert.Null(VariancePrior.Fit([1, 2, 3, 4, 5, 6, 7, 8, 9, double.NaN], [.. Enumerable.Repeat(5.0, 10)]));
        var result = ModeratedPairedT.Finish(PairedTOf([1, 2, 4]), null, TestOptions.Default);
        Assert.Equal(Outcome.TooFewEndpoints, result.Outcome);
        Assert.True(result.Remarks.HasFlag(Remarks.TooFewEndpoints));
        Assert.Equal(3, result.Sets);
    }

    [Fact]
    public void A_prior_worth_nothing_gives_the_paired_t_and_one_worth_everything_a_normal_test()
    {
        var paired = PairedTOf([1, 2, 4, -1, 3]);
        var nothing = ModeratedPairedT.Finish(paired, new VariancePrior(0, 7), TestOptions.Default);
        Assert.Equal(paired.Statistic, nothing.Statistic, tolerance: 1e-14);
        Assert.Equal(paired.P.Value, nothing.P.Value, tolerance: 1e-14);
        Assert.Equal(paired.EffectSize, nothing.EffectSize, tolerance: 1e-14);
        var everything = ModeratedPairedT.Finish(paired, new VariancePrior(double.PositiveInfinity, 4), TestOptions.Default);
        double z = paired.Estimate / (2 / Math.Sqrt(5));
        Assert.Equal(z, everything.Statistic, tolerance: 1e-14);
        Assert.Equal(2 * StandardNormal.UpperTail(z).Value, everything.P.Value, tolerance: 1e-15);
        Assert.Equal(paired.Estimate / 2, everything.EffectSize, tolerance: 1e-15);
    }

    [Fact]
    public void What_the_paired_t_could_not_test_keeps_its_reason()
    {
        var untested = PairedTOf([1, 1, 1]);
        Assert.Equal(untested, ModeratedPairedT.Finish(untested, new VariancePrior(4, 1), TestOptions.Default));
        Assert.True(double.IsNaN(ModeratedPairedT.VarianceOf(untested)));
        Assert.Equal(7.0 / 3, ModeratedPairedT.VarianceOf(PairedTOf([1, 2, 4])), tolerance: 1e-14);
    }

    [Theory]
    [InlineData(0.0)]
    [InlineData(-1.0)]
    [InlineData(double.PositiveInfinity)]
    public void A_variance_that_is_none_is_refused(double variance) => Assert.Throws<ArgumentOutOfRangeException>(() =>
        VariancePrior.Fit([.. Enumerable.Repeat(1.0, 11), variance], [.. Enumerable.Repeat(5.0, 12)]));

    [Fact]
    public void The_inverse_of_the_trigamma_function_is_its_inverse() =>
        Gen.Double[-8, 8].Select(exponent => Math.Pow(10, exponent)).Sample(value =>
            Assert.Equal(1, PolyGamma.Trigamma(PolyGamma.InverseTrigamma(value)) / value, tolerance: 1e-13));

    private static double Uniform(int endpoint, int counter) =>
        CounterRandom.Uniform(3, RandomPurpose.Invention, endpoint, counter) + (0.5 / (1L << 53));

    private static TestResult PairedTOf(double[] differences)
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return PairedT.Run(PairSample.Of(differences, new double[differences.Length], frame), TestOptions.Default, scratch);
    }
}
