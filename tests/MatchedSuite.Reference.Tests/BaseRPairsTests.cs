using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Reference.Tests;

/// <summary>Values that base R 4.2.2 gives by its own functions: mean(trim), qt, pt, digamma, trigamma, uniroot, qnorm, rank.</summary>
public class BaseRPairsTests
{
    private static readonly double[] Variances = [0.8, 1.3, 0.2, 2.9, 0.55, 1.1, 4.2, 0.33, 0.95, 1.7, 0.61, 2.2];
    private static readonly double[] DegreesOfFreedom = [9, 9, 8, 9, 9, 7, 9, 9, 9, 9, 8, 9];

    [Theory]
    // mean(d, trim = 0.2); squares of the winsorised d by hand; 2 * pt(-|t|, h - 1); qt(0.975, h - 1)
    [InlineData("darwin_maize", "cross", "self", 3.2222222222222223, 0.919471718293032, 8, 0.00802683233424697, 1.1019166376352105, 5.342527806809234)]
    [InlineData("sleep", "drug1", "drug2", -1.3333333333333333, 0.18293896978682977, 5, 0.0007608625898214348, -1.8035929260973784, -0.8630737405692885)]
    [InlineData("immer", "y1931", "y1932", 20.18333333333333, 4.579152460325158, 17, 3.848102633132522e-4, 10.52216613926556, 29.84450052740111)]
    [InlineData("lead_blood", "exposed", "control", 14.28571428571429, 2.670343785121296, 20, 3.092455080170778e-5, 8.715474758317690, 19.85595381311088)]
    public void Trimmed_means_agree(
        string dataset, string index, string reference, double estimate, double error, int df, double p, double low, double high)
    {
        var result = On(dataset, index, reference, TrimmedMean.Run);
        Near(estimate, result.Estimate);
        Near(error, result.StandardError);
        Assert.Equal(df, result.DegreesOfFreedom);
        Near(p, result.P.Value);
        Near(low, result.Interval.Low);
        Near(high, result.Interval.High);
    }

    [Fact]
    public void The_common_variance_and_a_moderated_t_agree()
    {
        var prior = VariancePrior.Fit(Variances, DegreesOfFreedom)!.Value;
        Near(4.7659541006272939, prior.DegreesOfFreedom);
        Near(0.9084353785584807, prior.Variance);
        var result = ModeratedPairedT.Finish(0.9, Variances[0], 9, 10, prior, TestOptions.Default);
        Near(3.1098488149063075, result.Statistic);
        Near(13.765954100627294, result.DegreesOfFreedom);
        Near(0.00781308863196189, result.P.Value);
        Near(0.27830048616058289, result.Interval.Low);
    }

    [Fact]
    public void Variances_that_scatter_less_than_chance_are_all_the_same()
    {
        double[] variances = [.. Enumerable.Range(0, 12).Select(i => i % 2 == 0 ? 1 : 1.1)];
        var prior = VariancePrior.Fit(variances, (double[])[.. Enumerable.Repeat(9.0, 12)])!.Value;
        Assert.Equal(double.PositiveInfinity, prior.DegreesOfFreedom);
        Near(1.176873752383267, prior.Variance);
    }

    [Theory]
    [InlineData(0.5, -1.9635100260214231, 4.934802200544679)]
    [InlineData(1, -0.57721566490153231, 1.6449340668482264)]
    [InlineData(2.5, 0.70315664064524341, 0.49035775610023491)]
    [InlineData(7, 1.87278433509846742, 0.15354517795933750)]
    [InlineData(40, 3.67632737403484322, 0.025315103841291028)]
    public void Derivatives_of_the_log_gamma_function_agree(double x, double digamma, double trigamma)
    {
        Assert.Equal(digamma, PolyGamma.DigammaLessLog(x) + Math.Log(x), tolerance: 2e-15);
        Near(trigamma, PolyGamma.Trigamma(x));
        Near(x, PolyGamma.InverseTrigamma(trigamma));
    }

    [Fact]
    public void The_interval_of_the_standardised_mean_of_the_sleep_data_agrees()
    {
        // uniroot on pt(t, 9, ncp) at both tails, over sqrt(10); R warns of its precision there, hence the tolerance
        var result = On("sleep", "drug1", "drug2", PairedT.Run);
        var interval = EffectSizeInterval.Of(result.Statistic, result.Sets, TestOptions.Default);
        Assert.Equal(-2.1180165139770675, interval.Low, tolerance: 1e-8);
        Assert.Equal(-0.4146277563801441, interval.High, tolerance: 1e-8);
    }

    [Fact]
    public void Rank_normal_scores_agree()
    {
        // qnorm((rank(x) - 0.375) / 8.25)
        double[] expected =
        [
            -0.1525059742462444, -1.0968035620935135, 0.1525059742462442, -1.0968035620935135, 0.4727891209922672, 1.4342001596863794,
            -0.4727891209922673, 0.8524950342746939,
        ];
        var scores = new double[8];
        RankNormalScores.Of([3, 1, 4, 1, 5, 9, 2, 6], scores, new Scratch());
        for (int i = 0; i < 8; i++)
            Assert.Equal(expected[i], scores[i], tolerance: 2e-15);
    }

    private delegate TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch);

    private static TestResult On(string dataset, string index, string reference, Run run)
    {
        var table = Expected.Table(dataset);
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return run(PairSample.Of(table.Numbers(index), table.Numbers(reference), frame), TestOptions.Default, scratch);
    }

    private static void Near(double expected, double actual) => Assert.Equal(expected, actual, tolerance: 5e-13 * Math.Abs(expected));
}
