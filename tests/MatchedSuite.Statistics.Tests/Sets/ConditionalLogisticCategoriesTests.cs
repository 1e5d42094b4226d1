using CsCheck;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Statistics.Tests.Sets;

public class ConditionalLogisticCategoriesTests
{
    private static readonly double[] Levels = [0, 1, 2];

    [Fact]
    public void Two_levels_give_the_likelihood_ratio_of_the_binary_endpoint() =>
        DrawnSets.AnyShape(6, 20).Sample(drawn =>
        {
            DrawnSets sets = drawn.Binary();
            TestResult omnibus = Run(sets, [0, 1]);
            ConditionalLogisticFit fit = sets.Fit();
            Assert.Equal(fit.Outcome, omnibus.Outcome);
            if (fit.Outcome != Outcome.Tested)
                return;
            Assert.Equal(fit.LikelihoodRatio.Statistic, omnibus.Statistic, 1e-9);
            Assert.Equal(1, omnibus.DegreesOfFreedom);
        });

    [Fact]
    public void Which_level_is_the_baseline_does_not_move_the_omnibus_test() =>
        DrawnSets.AnyShape(10, 25).Sample(drawn =>
        {
            DrawnSets sets = drawn.With(value => Math.Abs(Math.Round(value)) % 3);
            TestResult first = Run(sets, Levels), second = Run(sets, [2, 0, 1]);
            Assert.Equal(first.DegreesOfFreedom, second.DegreesOfFreedom);
            Assert.Equal(first.Statistic, second.Statistic, 1e-7);
        });

    [Fact]
    public void The_coefficients_stand_where_the_gradient_with_every_subset_listed_is_zero() =>
        DrawnSets.AnyShape(15, 25).Sample(drawn =>
        {
            DrawnSets sets = drawn.With(value => Math.Abs(Math.Round(value)) % 3);
            using Scratch.Frame frame = new Scratch().Open();
            double[] beta = new double[2], errors = new double[2];
            ConditionalLogisticFit fit = ConditionalLogisticCategories.Fit(
                sets.Take(frame), Levels, TestOptions.Default, new Scratch(), beta, errors);
            if (fit.Outcome != Outcome.Tested || fit.Remarks != Remarks.None || beta.Any(double.IsNaN))
                return;
            DrawnSets indicators = sets with
            {
                Covariates = Array.ConvertAll(sets.Values, value => value == 1 ? 1.0 : 0),
                Values = Array.ConvertAll(sets.Values, value => value == 2 ? 1.0 : 0),
            };
            var (logLikelihood, gradient, _) = EnumeratedLikelihood.Evaluate(indicators, beta);
            Assert.Equal(0, gradient[0] * errors[0], 1e-8);
            Assert.Equal(0, gradient[1] * errors[1], 1e-8);
            Assert.Equal(2 * (logLikelihood - fit.NullLogLikelihood), fit.LikelihoodRatio.Statistic, 1e-9);
        });

    [Fact]
    public void A_value_that_is_no_level_is_refused() =>
        Assert.Throws<ArgumentException>(() => Run(new DrawnSets([0, 1, 7], [0, 3], [true, false, false], []), Levels));

    private static TestResult Run(DrawnSets sets, double[] levels) =>
        sets.Run((in SetSample sample, TestOptions options, Scratch scratch) =>
            ConditionalLogisticCategories.Run(sample, levels, options, scratch));
}
