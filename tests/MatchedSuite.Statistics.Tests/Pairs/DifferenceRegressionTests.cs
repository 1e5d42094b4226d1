using CsCheck;
using MathNet.Numerics.LinearAlgebra;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class DifferenceRegressionTests
{
    private static readonly Gen<double> Value = Gen.Int[-999, 999].Select(v => v / 100.0);

    [Fact]
    public void Adjusted_means_and_slopes_equal_the_normal_equations_of_a_matrix_library() =>
        Gen.Select(Gen.Int[8, 40], Gen.Int[0, 3]).SelectMany((n, k) => Gen.Select(Value.Array[n], Value.Array[n], Value.Array[n * k]))
        .Sample((differences, exposure, covariates) =>
        {
            int n = differences.Length, k = covariates.Length / n;
            Vector<double>[] columns = [.. Enumerable.Range(0, k).Select(c => Vector<double>.Build.Dense(covariates[(c * n)..((c + 1) * n)]))];
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var pairs = PairSample.Of(differences, new double[n], frame);
            Agrees(differences, [.. columns, Vector<double>.Build.Dense(n, 1)],
                AdjustedPairedT.Run(RegressionPairs.WithCovariates(pairs, covariates), TestOptions.Default, scratch));
            Agrees(differences, [.. columns, Vector<double>.Build.Dense(exposure)],
                WithinPairSlope.Run(RegressionPairs.WithExposure(pairs, exposure, covariates), TestOptions.Default, scratch));
        });

    [Fact]
    public void An_exposure_of_one_unit_in_every_pair_gives_the_paired_t()
    {
        double[] differences = [1.5, 2, -0.5, 3, 0.25];
        var slope = Slope(differences, [1, 1, 1, 1, 1]);
        var plain = Adjusted(differences, []);
        Assert.Equal(plain.Estimate, slope.Estimate, tolerance: 1e-14);
        Assert.Equal(plain.P.Value, slope.P.Value, tolerance: 1e-14);
    }

    [Fact]
    public void Which_member_comes_first_does_not_matter_for_a_slope() =>
        Gen.Select(Value, Value, Gen.Bool).Array[4, 30].Where(pairs => pairs.Any(p => p.Item2 != 0)).Sample(pairs =>
        {
            var plain = Slope([.. pairs.Select(p => p.Item1)], [.. pairs.Select(p => p.Item2)]);
            var turned = Slope([.. pairs.Select(p => p.Item3 ? -p.Item1 : p.Item1)], [.. pairs.Select(p => p.Item3 ? -p.Item2 : p.Item2)]);
            Assert.Equal(plain, turned);
        });

    [Fact]
    public void A_covariate_that_says_nothing_new_is_left_out_and_named()
    {
        double[] differences = [1.5, 2, -0.5, 3, 0.25, 1], first = [1, 2, 0.5, -1, 3, 2], second = [0.1, 0.4, 0.3, 0.2, 0.9, -1];
        double[] sum = [.. first.Zip(second, (a, b) => a + (2 * b))];
        double[] both = [.. first, .. second];
        var plain = Adjusted(differences, both);
        Assert.Equal(Remarks.None, plain.Remarks);
        Assert.Equal(-1, FirstCollinear(differences, both));
        Assert.Equal(plain with { Remarks = Remarks.CollinearCovariate }, Adjusted(differences, [.. first, .. second, .. sum]));
        Assert.Equal(2, FirstCollinear(differences, [.. first, .. second, .. sum]));
        Assert.Equal(plain with { Remarks = Remarks.CollinearCovariate }, Adjusted(differences, [.. first, .. new double[6], .. second]));
        Assert.Equal(1, FirstCollinear(differences, [.. first, .. new double[6], .. second]));
        Assert.Equal(0, FirstCollinear(differences, [.. new double[6], .. first]));
    }

    [Fact]
    public void A_covariate_that_differs_alike_in_every_pair_leaves_nothing_to_tell()
    {
        var result = Adjusted([1.5, 2, -0.5, 3], [0.3, 0.3, 0.3, 0.3]);
        Assert.Equal(Outcome.Collinear, result.Outcome);
        Assert.True(result.Remarks.HasFlag(Remarks.Collinear));
        Assert.Equal(Outcome.Collinear, Slope([1, 2, 3, 5], [1, 2, 3, 4], [2, 4, 6, 8]).Outcome);
    }

    [Fact]
    public void What_cannot_be_computed_says_why()
    {
        Assert.Equal(Outcome.TooFewSets, Adjusted([1, 2], [1, 3]).Outcome);
        Assert.Equal(Outcome.TooFewSets, Slope([1], [1]).Outcome);
        Assert.Equal(Outcome.NothingDiffers, Slope([1, 2, 3], [0, 0, 0]).Outcome);
        Assert.Equal(Outcome.NoVariation, Slope([0.1, 0.2, 0.3], [1, 2, 3]).Outcome);
        Assert.Equal(Outcome.NoVariation, Adjusted([1.1, 1.2, 1.3, 1.7], [1, 2, 3, 7]).Outcome);
        Assert.Throws<ArgumentException>(() => Adjusted([1, 2, 3], [1, 2]));
        Assert.Throws<ArgumentException>(() => Slope([1, 2, 3], [1, 2]));
    }

    [Theory]
    [InlineData(1e200, 1)]
    [InlineData(1e-120, 1e150)]
    public void Units_near_the_ends_of_the_doubles_leave_t_alone(double unit, double exposureUnit)
    {
        double[] differences = [1.5, 2, -0.5, 3, 0.25], exposure = [1, 2, 0.5, 1, -1];
        var plain = Slope(differences, exposure);
        var scaled = Slope([.. differences.Select(v => v * unit)], [.. exposure.Select(v => v * exposureUnit)]);
        Assert.Equal(plain.Statistic, scaled.Statistic, tolerance: 1e-12);
        Assert.Equal(plain.EffectSize, scaled.EffectSize, tolerance: 1e-12);
    }

    private static void Agrees(double[] differences, Vector<double>[] columns, TestResult result)
    {
        var x = Matrix<double>.Build.DenseOfColumnVectors(columns);
        var y = Vector<double>.Build.Dense(differences);
        var coefficients = x.QR().Solve(y);
        var residual = y - (x * coefficients);
        int df = differences.Length - columns.Length;
        double error = Math.Sqrt(residual * residual / df * (x.Transpose() * x).Inverse()[columns.Length - 1, columns.Length - 1]);
        Assert.Equal(Outcome.Tested, result.Outcome);
        Assert.Equal(df, result.DegreesOfFreedom);
        Assert.Equal(coefficients[^1], result.Estimate, tolerance: 1e-9 * Math.Max(error, 1));
        Assert.Equal(error, result.StandardError, tolerance: 1e-9 * error);
    }

    private static TestResult Adjusted(double[] differences, double[] covariates)
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return AdjustedPairedT.Run(
            RegressionPairs.WithCovariates(PairSample.Of(differences, new double[differences.Length], frame), covariates),
            TestOptions.Default, scratch);
    }

    private static int FirstCollinear(double[] differences, double[] covariates)
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return AdjustedPairedT.FirstCollinear(
            RegressionPairs.WithCovariates(PairSample.Of(differences, new double[differences.Length], frame), covariates), scratch);
    }

    private static TestResult Slope(double[] differences, double[] exposure, params double[] covariates)
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return WithinPairSlope.Run(
            RegressionPairs.WithExposure(PairSample.Of(differences, new double[differences.Length], frame), exposure, covariates),
            TestOptions.Default, scratch);
    }
}
