using CsCheck;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Statistics.Tests.Sets;

public class ConditionalLogisticTests
{
    [Fact]
    public void At_the_estimates_the_gradient_with_every_subset_listed_is_zero() =>
        DrawnSets.AnyShape(8, 20, covariates: 1).Sample(sets =>
        {
            using Scratch.Frame frame = new Scratch().Open();
            double[] beta = new double[2], errors = new double[2];
            ConditionalLogisticFit fit = ConditionalLogistic.Fit(sets.Take(frame), TestOptions.Default, new Scratch(), beta, errors);
            if (fit.Outcome != Outcome.Tested || fit.Remarks != Remarks.None)
                return;
            var (logLikelihood, gradient, information) = EnumeratedLikelihood.Evaluate(sets, beta);
            double determinant = (information[0, 0] * information[1, 1]) - (information[0, 1] * information[0, 1]);
            double scale = information[0, 0] * information[1, 1] / determinant;
            Assert.Equal(logLikelihood, fit.LogLikelihood, 1e-10 * Math.Abs(logLikelihood));
            Assert.Equal(0, gradient[0] * errors[0], 1e-9 * scale);
            Assert.Equal(0, gradient[1] * errors[1], 1e-9 * scale);
            Assert.Equal(Math.Sqrt(information[1, 1] / determinant), errors[0], 1e-8 * scale * errors[0]);
            Assert.Equal(Math.Sqrt(information[0, 0] / determinant), errors[1], 1e-8 * scale * errors[1]);
        });

    [Fact]
    public void One_to_one_sets_give_the_logistic_regression_without_intercept_on_the_differences() =>
        DrawnSets.Pairs(8, 40).Sample(sets =>
        {
            ConditionalLogisticFit fit = sets.Fit();
            if (fit.Outcome != Outcome.Tested || fit.Remarks != Remarks.None)
                return;
            double[] differences = [.. Enumerable.Range(0, sets.Count).Select(s => sets.Split(s).Index[0] - sets.Split(s).Reference[0])];
            double slope = differences.Sum(d => d / (1 + Math.Exp(fit.Estimate * d)));
            double information = differences.Sum(d => d * d * Math.Exp(fit.Estimate * d) / Math.Pow(1 + Math.Exp(fit.Estimate * d), 2));
            Assert.Equal(0, slope * fit.StandardError, 1e-9);
            Assert.Equal(1 / Math.Sqrt(information), fit.StandardError, 1e-9 * fit.StandardError);
            Assert.Equal(-differences.Sum(d => Math.Log(1 + Math.Exp(-fit.Estimate * d))), fit.LogLikelihood, 1e-10 * Math.Abs(fit.LogLikelihood));
        });

    [Fact]
    public void Binary_one_to_one_sets_give_the_logarithm_of_the_ratio_of_discordant_pairs() =>
        DrawnSets.Pairs(10, 60).Sample(drawn =>
        {
            DrawnSets sets = drawn.Binary();
            int b = Enumerable.Range(0, sets.Count).Count(s => sets.Split(s).Index[0] > sets.Split(s).Reference[0]);
            int c = Enumerable.Range(0, sets.Count).Count(s => sets.Split(s).Index[0] < sets.Split(s).Reference[0]);
            TestResult result = sets.Run(ConditionalLogistic.Run);
            if (b + c == 0)
            {
                Assert.Equal(Outcome.NothingDiffers, result.Outcome);
                return;
            }

            ConditionalLogisticFit fit = sets.Fit();
            Assert.Equal((b - c) * (double)(b - c) / (b + c), fit.Score.Statistic, 1e-10 * (b + c)); // McNemar's statistic
            if (b == 0 || c == 0)
            {
                Assert.Equal(b == 0 ? double.NegativeInfinity : double.PositiveInfinity, result.Estimate);
                return;
            }

            Assert.Equal(Math.Log((double)b / c), result.Estimate, 1e-11);
            Assert.Equal(Math.Sqrt((1.0 / b) + (1.0 / c)), result.StandardError, 1e-10 * result.StandardError);
        });

    [Fact]
    public void Swapping_the_roles_turns_every_sign() =>
        DrawnSets.AnyShape(6, 20).Sample(sets =>
        {
            TestResult forward = sets.Run(ConditionalLogistic.Run), backward = sets.Swapped().Run(ConditionalLogistic.Run);
            SetLaws.AreMirrored(forward, backward, 1e-8);
        });

    [Fact]
    public void Another_unit_and_another_origin_change_nothing_without_unit() =>
        DrawnSets.AnyShape(6, 20).Sample(sets =>
        {
            TestResult before = sets.Run(ConditionalLogistic.Run);
            TestResult after = sets.With(value => (value * 8) + 64).Run(ConditionalLogistic.Run);
            SetLaws.AreEqual(before, after, 1.0 / 8, 1e-8);
        });

    [Fact]
    public void The_order_of_sets_and_members_plays_no_part() =>
        DrawnSets.AnyShape(6, 20).Sample(sets =>
            SetLaws.AreEqual(sets.Run(ConditionalLogistic.Run), sets.Turned().Run(ConditionalLogistic.Run), 1, 1e-8));

    [Fact]
    public void A_set_without_variation_or_without_one_of_the_roles_changes_nothing() =>
        DrawnSets.AnyShape(6, 20).Sample(sets =>
        {
            TestResult before = sets.Run(ConditionalLogistic.Run);
            TestResult after = sets.And([2, 2, 2], [true, false, false]).And([1, 5], [false, false]).And([3, double.NaN], [true, false])
                .Run(ConditionalLogistic.Run);
            SetLaws.AreEqual(before, after with { Sets = before.Sets, Samples = before.Samples }, 1, 1e-8);
            if (before.Outcome == Outcome.Tested)
                Assert.Equal((before.Sets + 1, before.Samples + 3), (after.Sets, after.Samples));
        });

    [Fact]
    public void The_interval_excludes_zero_exactly_when_p_is_below_one_minus_confidence() =>
        SetLaws.IntervalAgreesWithP(ConditionalLogistic.Run, DrawnSets.AnyShape(6, 20));

    [Fact]
    public void At_the_ends_of_the_profile_interval_the_likelihood_has_fallen_by_the_quantile() =>
        DrawnSets.AnyShape(6, 15).Sample(sets =>
        {
            using Scratch.Frame frame = new Scratch().Open();
            Interval interval = ConditionalLogistic.ProfileInterval(sets.Take(frame), TestOptions.Default, new Scratch());
            ConditionalLogisticFit fit = sets.Fit();
            if (fit.Outcome != Outcome.Tested)
                return;
            Assert.True(interval.Low < fit.Estimate || double.IsInfinity(interval.Low));
            Assert.True(interval.High > fit.Estimate || double.IsInfinity(interval.High));
            foreach (double end in new[] { interval.Low, interval.High }.Where(double.IsFinite))
            {
                double fallen = 2 * (fit.LogLikelihood - EnumeratedLikelihood.Evaluate(sets, [end]).LogLikelihood);
                Assert.Equal(3.841458820694124, fallen, 1e-8); // square of the normal quantile 1.959963984540054
            }
        });

    [Fact]
    public void What_cannot_be_tested_says_why()
    {
        var level = new DrawnSets([3, 3, 3, 5, 5], [0, 3, 5], [true, false, false, true, false], []);
        TestResult result = level.Run(ConditionalLogistic.Run);
        Assert.Equal((Outcome.NothingDiffers, Remarks.NothingDiffers), (result.Outcome, result.Remarks));
        Assert.Equal((2, 5), (result.Sets, result.Samples));
        Assert.Equal(Outcome.NothingDiffers, (level with { Covariates = [1, 4, 2, 3, 6] }).Run(ConditionalLogistic.Run).Outcome);
        Assert.Equal(Outcome.TooFewSets, new DrawnSets([3, 4], [0, 2], [true, true], []).Run(ConditionalLogistic.Run).Outcome);
    }
}
