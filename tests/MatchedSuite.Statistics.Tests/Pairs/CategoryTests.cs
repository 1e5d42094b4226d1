using CsCheck;
using MathNet.Numerics.LinearAlgebra;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class CategoryTests
{
    private delegate TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch);

    [Fact]
    public void Two_categories_give_the_test_of_McNemar() =>
        Gen.Select(Gen.Int[0, 1], Gen.Int[0, 1]).Array[1, 60].Sample(pairs =>
        {
            double[] index = [.. pairs.Select(p => (double)p.Item1)], reference = [.. pairs.Select(p => (double)p.Item2)];
            var expected = On(index, reference, McNemar.Run);
            foreach (Run run in new Run[] { Bowker.Run, StuartMaxwell.Run })
            {
                var result = On(index, reference, run);
                Assert.Equal(expected.Outcome, result.Outcome);
                Assert.Equal(expected.Statistic, result.Statistic, tolerance: 1e-12);
                Assert.Equal(expected.P.Value, result.P.Value, tolerance: 1e-12);
            }
        });

    [Fact]
    public void Marginal_homogeneity_is_the_quadratic_form_with_the_pseudo_inverse() =>
        Gen.Select(Gen.Int[0, 5], Gen.Int[0, 5]).Array[1, 40].Sample(pairs =>
        {
            const int K = 6;
            var counts = Matrix<double>.Build.Dense(K, K);
            foreach (var (index, reference) in pairs)
                counts[index, reference]++;
            var rows = counts.RowSums();
            var columns = counts.ColumnSums();
            var covariance = -(counts + counts.Transpose());
            for (int i = 0; i < K; i++)
                covariance[i, i] = rows[i] + columns[i] - (2 * counts[i, i]);
            var svd = covariance.Svd();
            int rank = svd.S.Count(value => value > 1e-9);
            var result = On([.. pairs.Select(p => (double)p.Item1)], [.. pairs.Select(p => (double)p.Item2)], StuartMaxwell.Run);
            if (rank == 0)
            {
                Assert.Equal(Outcome.NothingDiffers, result.Outcome);
                return;
            }

            var d = svd.U.Transpose() * (rows - columns);
            double expected = Enumerable.Range(0, rank).Sum(i => d[i] * d[i] / svd.S[i]);
            Assert.Equal(rank, result.DegreesOfFreedom);
            Assert.Equal(expected, result.Statistic, tolerance: 1e-9);
        });

    [Fact]
    public void A_category_that_no_pair_enters_or_leaves_adds_nothing()
    {
        double[] index = [0, 0, 1, 2, 2, 1, 0], reference = [1, 1, 2, 0, 1, 0, 2];
        foreach (Run run in new Run[] { Bowker.Run, StuartMaxwell.Run })
        {
            var plain = On(index, reference, run);
            var more = On([.. index, 7, 7, -3], [.. reference, 7, 7, -3], run);
            Assert.Equal(plain.Statistic, more.Statistic, tolerance: 1e-12);
            Assert.Equal(plain.DegreesOfFreedom, more.DegreesOfFreedom);
        }
    }

    [Fact]
    public void Groups_without_moves_between_them_are_tested_each_for_itself()
    {
        double[] index = [0, 0, 0, 1], reference = [1, 1, 1, 0];
        double[] otherIndex = [5, 5, 6], otherReference = [6, 6, 5];
        var (first, second) = (On(index, reference, StuartMaxwell.Run), On(otherIndex, otherReference, StuartMaxwell.Run));
        var both = On([.. index, .. otherIndex], [.. reference, .. otherReference], StuartMaxwell.Run);
        Assert.Equal(first.Statistic + second.Statistic, both.Statistic, tolerance: 1e-13);
        Assert.Equal(2, both.DegreesOfFreedom);
    }

    [Fact]
    public void What_cannot_be_computed_says_why()
    {
        foreach (Run run in new Run[] { Bowker.Run, StuartMaxwell.Run })
        {
            Assert.Equal(Outcome.NothingDiffers, On([1, 2, 3], [1, 2, 3], run).Outcome);
            Assert.Equal(Outcome.TooFewSets, On([], [], run).Outcome);
            Assert.Equal(Outcome.TooManyCategories, On([.. Enumerable.Range(0, 101).Select(i => (double)i)], new double[101], run).Outcome);
        }
    }

    private static TestResult On(double[] index, double[] reference, Run run)
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return run(PairSample.Of(index, reference, frame), TestOptions.Default, scratch);
    }
}
