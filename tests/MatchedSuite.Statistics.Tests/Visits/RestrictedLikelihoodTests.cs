using CsCheck;
using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Statistics.Tests.Visits;

/// <summary>The profiled likelihood against the plain one: dense covariance matrices, solved by elimination.</summary>
public class RestrictedLikelihoodTests
{
    [Fact]
    public void The_likelihood_with_covariates_is_that_of_dense_matrices() =>
        Cases.Sample((table, covariate) =>
        {
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var fit = MixedModel.Fit(table.Sample().WithCovariates(covariate, 1), VisitTerm.Means, frame);
            if (fit.Outcome != Outcome.Tested)
                return;
            double dense = Dense(table, covariate, fit.VarianceWithin, fit.VarianceBetween);
            Close.To(dense, fit.RestrictedLogLikelihood, 1e-9, 1e-9);
        }, iter: 200);

    [Fact]
    public void No_other_variances_near_or_far_are_more_likely() =>
        Gen.Select(Cases, Gen.Double[-0.2, 0.2], Gen.Double[-3, 3]).Sample((setting, near, far) =>
        {
            var (table, covariate) = setting;
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var fit = MixedModel.Fit(table.Sample().WithCovariates(covariate, 1), VisitTerm.Means, frame);
            if (fit.Outcome != Outcome.Tested)
                return;
            double between = fit.VarianceBetween == 0 ? 0.1 * fit.VarianceWithin : fit.VarianceBetween;
            foreach (double shift in new[] { near, far })
            {
                double other = Dense(table, covariate, fit.VarianceWithin * Math.Exp(-shift / 3), between * Math.Exp(shift));
                Assert.True(other <= fit.RestrictedLogLikelihood + 1e-9, $"{other:R} > {fit.RestrictedLogLikelihood:R}");
            }
        }, iter: 300);

    [Fact]
    public void First_and_second_derivatives_are_those_of_small_differences() =>
        Gen.Select(VisitTable.Gappy(6, 12, 2, 4), Gen.Double[0.1, 4]).Sample((table, ratio) =>
        {
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var moments = RandomInterceptMoments.Of(table.Sample(), VisitTerm.Line, frame);
            var profile = new RandomInterceptProfile(moments, new double[moments.Parameters + 1], frame);
            const double Step = 1e-4;
            Assert.True(profile.Evaluate(ratio + Step));
            double after = profile.Deviance;
            profile.Evaluate(ratio - Step);
            double before = profile.Deviance;
            profile.Evaluate(ratio);
            Close.To((after - before) / (2 * Step), profile.Score, 1e-4, 1e-5);
            Close.To((after - 2 * profile.Deviance + before) / (Step * Step), profile.Curvature, 1e-3, 1e-3);
        }, iter: 200);

    [Fact]
    public void The_exact_interval_covers_as_often_as_it_says_also_with_missing_visits()
    {
        const int Runs = 2000;
        const double Ratio = 0.6;
        var random = new Random(20);
        var scratch = new Scratch();
        int covered = 0;
        for (int run = 0; run < Runs; run++)
        {
            using var frame = scratch.Open();
            double[] values = new double[36];
            double level = 0;
            for (int at = 0; at < values.Length; at++)
            {
                if (at % 3 == 0)
                    level = Math.Sqrt(Ratio) * Normal(random);
                values[at] = at % 7 == 0 ? double.NaN : level + Normal(random) + at % 3;
            }

            var fit = MixedModel.Fit(VisitSample.Of(values, [0, 1, 2]), VisitTerm.Means, frame);
            if (VarianceRatioInterval.Of(fit, 0.9, scratch).Contains(Ratio))
                covered++;
        }

        // Four standard deviations of a binomial count.
        Assert.InRange(covered, 0.9 * Runs - 4 * Math.Sqrt(0.09 * Runs), 0.9 * Runs + 4 * Math.Sqrt(0.09 * Runs));
    }

    private static Gen<(VisitTable Table, double[] Covariate)> Cases { get; } =
        from table in VisitTable.Gappy(6, 10, 2, 4)
        from covariate in Gen.Int[10000, 20000].Array[table.Values.Length]
        select (table, covariate.Select(value => value / 1000.0).ToArray());

    private static double Normal(Random random) =>
        Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());

    // −½[(N − p) ln 2π + ln|V| + ln|X'V⁻¹X| + r'V⁻¹r] with V of all observations, by Gaussian elimination.
    private static double Dense(VisitTable table, double[] covariate, double within, double between)
    {
        int[] seen = [.. Enumerable.Range(0, table.Values.Length).Where(at => !double.IsNaN(table.Values[at]))];
        int n = seen.Length, p = table.Visits + 1;
        // The likelihood of residuals depends on the scale of the columns; the model centres the covariate.
        double centre = seen.Average(at => covariate[at]);
        double[][] columns =
        [
            .. Enumerable.Range(0, table.Visits).Select(j => seen.Select(at => at % table.Visits == j ? 1.0 : 0).ToArray()),
            [.. seen.Select(at => covariate[at] - centre)],
            [.. seen.Select(at => table.Values[at])],
        ];
        double[][] covariance = [.. seen.Select(a => seen.Select(b =>
            (a == b ? within : 0) + (a / table.Visits == b / table.Visits ? between : 0)).ToArray())];
        double logV = Eliminate(covariance, columns, out var solved);
        double[][] cross = [.. Enumerable.Range(0, p).Select(a => Enumerable.Range(0, p).Select(b => Product(columns[a], solved[b])).ToArray())];
        double[] right = [.. Enumerable.Range(0, p).Select(a => Product(columns[a], solved[p]))];
        double logX = Eliminate(cross, [right], out var coefficients);
        double rest = Product(columns[p], solved[p]) - Product(right, coefficients[0]);
        return -0.5 * ((n - p) * Math.Log(2 * Math.PI) + logV + logX + rest);
    }

    private static double Product(double[] left, double[] right) => left.Zip(right, (a, b) => a * b).Sum();

    private static double Eliminate(double[][] matrix, double[][] columns, out double[][] solved)
    {
        int n = matrix.Length;
        double[][] work = [.. matrix.Select((row, i) => (double[])[.. row, .. columns.Select(column => column[i])])];
        double logarithm = 0;
        for (int i = 0; i < n; i++)
        {
            logarithm += Math.Log(work[i][i]);
            for (int r = 0; r < n; r++)
            {
                if (r == i)
                    continue;
                double factor = work[r][i] / work[i][i];
                for (int c = i; c < work[r].Length; c++)
                    work[r][c] -= factor * work[i][c];
            }
        }

        solved = [.. Enumerable.Range(0, columns.Length).Select(q => Enumerable.Range(0, n).Select(i => work[i][n + q] / work[i][i]).ToArray())];
        return logarithm;
    }
}
