using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Reference.Tests;

/// <summary>
/// Regressions certified by NIST (Statistical Reference Datasets, linear regression: Longley 1967 and NoInt1), and Student's sleep data with two
/// invented covariates against base R 4.2.2 lm.
/// </summary>
public class RegressionOnDifferencesTests
{
    // NIST StRD Longley: employment, then prices, product, unemployed, armed forces, population, year.
    private static readonly double[] Employed =
    [
        60323, 61122, 60171, 61187, 63221, 63639, 64989, 63761, 66019, 67857, 68169, 66513, 68655, 69564, 69331, 70551,
    ];

    private static readonly double[] Economy =
    [
        83.0, 88.5, 88.2, 89.5, 96.2, 98.1, 99.0, 100.0, 101.2, 104.6, 108.4, 110.8, 112.6, 114.2, 115.7, 116.9,
        234289, 259426, 258054, 284599, 328975, 346999, 365385, 363112, 397469, 419180, 442769, 444546, 482704, 502601, 518173, 554894,
        2356, 2325, 3682, 3351, 2099, 1932, 1870, 3578, 2904, 2822, 2936, 4681, 3813, 3931, 4806, 4007,
        1590, 1456, 1616, 1650, 3099, 3594, 3547, 3350, 3048, 2857, 2798, 2637, 2552, 2514, 2572, 2827,
        107608, 108632, 109773, 110929, 112075, 113270, 115094, 116219, 117388, 118734, 120445, 121950, 123366, 125368, 127852, 130081,
        1947, 1948, 1949, 1950, 1951, 1952, 1953, 1954, 1955, 1956, 1957, 1958, 1959, 1960, 1961, 1962,
    ];

    private static readonly double[] FirstCovariate = [1.2, -0.4, 0.7, 2.1, -1.5, 0.3, 0.9, -0.8, 1.6, 0.1];
    private static readonly double[] SecondCovariate = [3, 1, -2, 4, 0, 1, -1, 2, 5, -3];

    [Fact]
    public void The_constant_of_Longley_has_the_certified_digits_in_spite_of_near_collinearity()
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var sample = RegressionPairs.WithCovariates(PairSample.Of(Employed, new double[16], frame), Economy);
        var result = AdjustedPairedT.Run(sample, TestOptions.Default, scratch);
        Assert.Equal(-3482258.63459582, result.Estimate, tolerance: 1e-9 * 3482258);
        Assert.Equal(890420.383607373, result.StandardError, tolerance: 1e-9 * 890420);
        Assert.Equal(9, result.DegreesOfFreedom);
        Assert.Equal(Remarks.None, result.Remarks);
        Assert.Equal(-1, AdjustedPairedT.FirstCollinear(sample, scratch));
    }

    [Fact]
    public void A_slope_through_the_origin_has_the_certified_digits_of_NoInt1()
    {
        double[] y = [.. Enumerable.Range(130, 11).Select(v => (double)v)], x = [.. Enumerable.Range(60, 11).Select(v => (double)v)];
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var result = WithinPairSlope.Run(
            RegressionPairs.WithExposure(PairSample.Of(y, new double[11], frame), x, []), TestOptions.Default, scratch);
        Assert.Equal(2.07438016528926, result.Estimate, tolerance: 1e-14);
        Assert.Equal(0.0165289256198347, result.StandardError, tolerance: 1e-15);
        Assert.Equal(10, result.DegreesOfFreedom);
    }

    [Fact]
    public void Sleep_adjusted_for_two_covariates_agrees_with_base_R()
    {
        var result = OnSleep((sample, options, scratch) => AdjustedPairedT.Run(sample, options, scratch), exposed: false);
        Assert.Equal(-1.2735105246387135, result.Estimate, tolerance: 1e-13);
        Assert.Equal(0.40463913724924855, result.StandardError, tolerance: 1e-13);
        Assert.Equal(-3.1472747132076346, result.Statistic, tolerance: 1e-12);
        Assert.Equal(0.01621362851367079, result.P.Value, tolerance: 1e-14);
        Assert.Equal(-2.230330041721868, result.Interval.Low, tolerance: 1e-12);
        Assert.Equal(-0.316691007555559, result.Interval.High, tolerance: 1e-12);
        // sigma of the same fit
        Assert.Equal(result.Estimate / 1.155970107815969 * HedgesCorrection.Factor(7), result.EffectSize, tolerance: 1e-13);
    }

    [Fact]
    public void Sleep_on_an_exposure_agrees_with_base_R_with_and_without_a_covariate()
    {
        var alone = OnSleep((sample, options, scratch) =>
            WithinPairSlope.Run(RegressionPairs.WithExposure(sample.Pairs, FirstCovariate, []), options, scratch), exposed: true);
        Assert.Equal(-1.003110419906687, alone.Estimate, tolerance: 1e-13);
        Assert.Equal(0.4706696748575527, alone.StandardError, tolerance: 1e-13);
        Assert.Equal(0.06189651647751015, alone.P.Value, tolerance: 1e-14);
        var adjusted = OnSleep((sample, options, scratch) => WithinPairSlope.Run(sample, options, scratch), exposed: true);
        Assert.Equal(-0.7040736718116594, adjusted.Estimate, tolerance: 1e-13);
        Assert.Equal(0.5498826244474818, adjusted.StandardError, tolerance: 1e-13);
        Assert.Equal(0.2362762088201780, adjusted.P.Value, tolerance: 1e-14);
    }

    // Twenty discordant pairs, 1 where the index member has the sign; invented, with two covariate differences.
    private static readonly double[] IndexHasIt = [1, 1, 0, 1, 0, 1, 1, 1, 0, 1, 0, 1, 1, 0, 1, 1, 0, 1, 1, 1];

    private static readonly double[] BinaryCovariates =
    [
        1.2, -0.4, 0.7, 2.1, -1.5, 0.3, 0.9, -0.8, 1.6, 0.1, -1, 0.5, 1.1, -0.6, 0.2, 1.9, -0.3, -1.2, 0.8, 0.4,
        3, 1, -2, 4, 0, 1, -1, 2, 5, -3, 1, 0, 2, -1, 1, 0, 3, -2, 1, 2,
    ];

    [Fact]
    public void An_adjusted_odds_ratio_is_the_constant_of_a_logistic_regression_on_discordant_pairs()
    {
        // base R 4.2.2: glm(y ~ x + z, family = binomial, control = list(epsilon = 1e-15))
        var adjusted = OddsRatio(IndexHasIt, BinaryCovariates);
        Assert.Equal(0.9322524143042363, adjusted.Estimate, tolerance: 1e-10);
        Assert.Equal(0.6036916913445095, adjusted.StandardError, tolerance: 1e-10);
        Assert.Equal(1.5442525177511954, adjusted.Statistic, tolerance: 1e-10);
        Assert.Equal(0.1225271705498399, adjusted.P.Value, tolerance: 1e-10);
        Assert.Equal(20, adjusted.Sets);
        var plain = OddsRatio(IndexHasIt, []);
        Assert.Equal(Math.Log(14.0 / 6), plain.Estimate, tolerance: 1e-12);
        Assert.Equal(Math.Sqrt((1.0 / 14) + (1.0 / 6)), plain.StandardError, tolerance: 1e-12);
    }

    [Fact]
    public void Concordant_pairs_change_no_odds_ratio_and_one_that_leans_one_way_is_marked()
    {
        double[] index = [.. IndexHasIt, 1, 0, 1], reference = [.. IndexHasIt.Select(v => 1 - v), 1, 0, 1];
        double[] covariates = [.. BinaryCovariates[..20], 9, 9, 9, .. BinaryCovariates[20..], -9, 9, 0];
        var more = OddsRatio(index, reference, covariates);
        Assert.Equal(OddsRatio(IndexHasIt, BinaryCovariates) with { Sets = 23, Samples = 46 }, more);
        Assert.True(OddsRatio([1, 1, 1, 1], [0.1, -0.3, 0.2, 0.4]).Remarks.HasFlag(Remarks.Separated));
        Assert.Equal(Outcome.NothingDiffers, OddsRatio([1, 0], [1, 0], [1, 2]).Outcome);
        Assert.Throws<ArgumentException>(() => OddsRatio([2], [1], [1]));
    }

    private static TestResult OddsRatio(double[] indexHasIt, double[] covariates) =>
        OddsRatio(indexHasIt, [.. indexHasIt.Select(v => 1 - v)], covariates);

    private static TestResult OddsRatio(double[] index, double[] reference, double[] covariates)
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return AdjustedOddsRatio.Run(
            RegressionPairs.WithCovariates(PairSample.Of(index, reference, frame), covariates), TestOptions.Default, scratch);
    }

    private delegate TestResult Regression(RegressionPairs sample, TestOptions options, Scratch scratch);

    private static TestResult OnSleep(Regression regression, bool exposed)
    {
        var table = Expected.Table("sleep");
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var pairs = PairSample.Of(table.Numbers("drug1"), table.Numbers("drug2"), frame);
        return regression(exposed
            ? RegressionPairs.WithExposure(pairs, FirstCovariate, SecondCovariate)
            : RegressionPairs.WithCovariates(pairs, (double[])[.. FirstCovariate, .. SecondCovariate]), TestOptions.Default, scratch);
    }
}
