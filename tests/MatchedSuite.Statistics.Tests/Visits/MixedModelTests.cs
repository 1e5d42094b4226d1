using CsCheck;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Statistics.Visits;
using MatchedSuite.Tests;

namespace MatchedSuite.Statistics.Tests.Visits;

public class MixedModelTests
{
    private static readonly TestOptions Options = TestOptions.Default;

    [Fact]
    public void Complete_visits_give_the_closed_form_of_the_analysis_of_variance() =>
        VisitTable.Complete(4, 12, 2, 5).Sample(table =>
        {
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var anova = RepeatedMeasuresAnova.Fit(table.Sample(), scratch);
            double errorSquare = anova.ErrorSquares / anova.ErrorDegrees;
            double subjectSquare = anova.SubjectSquares / (anova.Subjects - 1);
            var fit = MixedModel.Fit(table.Sample(), VisitTerm.Means, frame);
            if (subjectSquare <= errorSquare)
            {
                Assert.Equal(0, fit.VarianceBetween);
                Assert.Equal(Remarks.SingularFit, fit.Remarks);
                return;
            }

            Close.To(errorSquare, fit.VarianceWithin, 1e-11);
            Close.To((subjectSquare - errorSquare) / table.Visits, fit.VarianceBetween, 1e-9, 1e-12);
            var omnibus = MixedModel.Omnibus(fit, Options, scratch);
            Close.To(anova.F, omnibus.Statistic, 1e-10);
            Close.To(anova.ErrorDegrees, omnibus.DenominatorDegreesOfFreedom, 1e-7);
            Close.To(anova.P(SphericityCorrection.None).Log10, omnibus.P.Log10, 1e-7, 1e-9);
            Close.To(anova.PartialEtaSquared, omnibus.EffectSize, 1e-7);
        }, iter: 400);

    [Fact]
    public void Two_complete_visits_give_the_paired_t_test_unless_the_pairs_are_negatively_correlated() =>
        VisitTable.Complete(4, 15, 2, 2).Sample(table =>
        {
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var fit = MixedModel.Fit(table.Sample(), VisitTerm.Means, frame);
            if (fit.VarianceBetween == 0)
                return;
            var expected = PairedT.Run(PairSample.Of(table.Visit(1), table.Visit(0), frame), Options, scratch);
            var found = MixedModel.Difference(fit, 1, 0, Options, scratch);
            Close.To(expected.Estimate, found.Estimate, 1e-11, 1e-14);
            Close.To(expected.StandardError, found.StandardError, 1e-10);
            Close.To(expected.DegreesOfFreedom, found.DegreesOfFreedom, 1e-7);
            Close.To(expected.P.Value, found.P.Value, 1e-6);
            Close.To(expected.Interval.Low, found.Interval.Low, 1e-7, 1e-9);
        }, iter: 300);

    [Fact]
    public void A_variance_at_its_bound_gives_least_squares_and_says_so()
    {
        // Each subject's values sum to 0 within a trifle: less spread between subjects than chance gives.
        double[] values = [-1, 1.1, 2, -2.1, -3, 3.2, 1.5, -1.5, -0.5, 0.4];
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var fit = MixedModel.Fit(VisitSample.Of(values, [0, 1]), VisitTerm.Means, frame);
        var found = MixedModel.Difference(fit, 1, 0, Options, scratch);
        double[] first = [-1, 2, -3, 1.5, -0.5], second = [1.1, -2.1, 3.2, -1.5, 0.4];
        double pooled = (Squares(first) + Squares(second)) / 8;
        Assert.Equal(Remarks.SingularFit, found.Remarks);
        Assert.Equal(0, fit.IntraclassCorrelation);
        Close.To(second.Average() - first.Average(), found.Estimate, 1e-13);
        Close.To(Math.Sqrt(pooled * 2 / 5), found.StandardError, 1e-13);
        Close.To(8, found.DegreesOfFreedom, 1e-12);
    }

    [Fact]
    public void Subjects_a_million_times_further_apart_than_their_visits_still_give_the_closed_form()
    {
        double[] values = [.. Enumerable.Range(0, 30).Select(at => Math.Pow(at / 3 + 1, 6) * 8 + (at * at % 7) / 8.0)];
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var fit = MixedModel.Fit(VisitSample.Of(values, [0, 1, 2]), VisitTerm.Means, frame);
        var anova = RepeatedMeasuresAnova.Fit(VisitSample.Of(values, [0, 1, 2]), scratch);
        var omnibus = MixedModel.Omnibus(fit, Options, scratch);
        Assert.True(fit.VarianceRatio > 1e12);
        Close.To(anova.F, omnibus.Statistic, 1e-9);
        Close.To(anova.ErrorDegrees, omnibus.DenominatorDegreesOfFreedom, 1e-9);
    }

    [Fact]
    public void Covariances_of_coefficients_are_those_of_their_contrasts() =>
        VisitTable.Gappy(6, 12, 3, 4).Sample(table =>
        {
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var fit = MixedModel.Fit(table.Sample(), VisitTerm.Means, frame);
            if (fit.Outcome != Outcome.Tested)
                return;
            var difference = MixedModel.Difference(fit, 2, 1, Options, scratch);
            Close.To(difference.Estimate, fit.Coefficients[2] - fit.Coefficients[1], 1e-10, 1e-12);
            double variance = fit.Covariance(1, 1) + fit.Covariance(2, 2) - 2 * fit.Covariance(2, 1);
            Close.To(difference.StandardError, Math.Sqrt(variance), 1e-9);
            var level = MixedModel.Contrast(fit, [0, 1], Options, scratch);
            Close.To(level.StandardError, fit.StandardError(1), 1e-11);
            Close.To(level.Estimate, fit.Coefficients[1], 1e-12, 1e-14);
            Close.To(MixedModel.Contrast(fit, [1], Options, scratch).StandardError, fit.StandardError(0), 1e-11);
        }, iter: 200);

    [Fact]
    public void The_order_of_subjects_and_visits_changes_nothing() =>
        VisitTable.Gappy(6, 12, 3, 4).Sample(table =>
        {
            var here = MixedModel.Run(table.Sample(), Options, new Scratch());
            var turned = MixedModel.Run(table.SubjectsReversed().VisitsReversed().Sample(), Options, new Scratch());
            Assert.Equal(here.Outcome, turned.Outcome);
            Close.To(here.Statistic, turned.Statistic, 1e-9);
            Close.To(here.DenominatorDegreesOfFreedom, turned.DenominatorDegreesOfFreedom, 1e-6);
        }, iter: 300);

    [Fact]
    public void Another_unit_and_origin_change_only_what_has_a_unit() =>
        VisitTable.Gappy(6, 12, 3, 4).Sample(table =>
        {
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var here = MixedModel.Fit(table.Sample(), VisitTerm.Means, frame);
            var there = MixedModel.Fit(table.Map(value => 8 * value + 4096).Sample(), VisitTerm.Means, frame);
            Assert.Equal(here.Outcome, there.Outcome);
            if (here.Outcome != Outcome.Tested)
                return;
            Close.To(here.IntraclassCorrelation, there.IntraclassCorrelation, 1e-8, 1e-9);
            Close.To(64 * here.VarianceWithin, there.VarianceWithin, 1e-9);
            var difference = MixedModel.Difference(here, 1, 0, Options, scratch);
            var scaled = MixedModel.Difference(there, 1, 0, Options, scratch);
            Close.To(8 * difference.Estimate, scaled.Estimate, 1e-8, 1e-9);
            Close.To(difference.P.Value, scaled.P.Value, 1e-7);
        }, iter: 300);

    [Fact]
    public void An_offset_of_1e9_costs_no_more_than_the_digits_it_takes_from_the_values()
    {
        double[] values = [1, 2.25, 3.5, 2, 2.75, 4, double.NaN, 3, 3.25, 0.5, 2, double.NaN, 1.75, 2.5, 4.25];
        var scratch = new Scratch();
        var here = MixedModel.Run(VisitSample.Of(values, [0, 1, 2]), Options, scratch);
        var far = MixedModel.Run(VisitSample.Of([.. values.Select(value => value + 1e9)], [0, 1, 2]), Options, scratch);
        Assert.Equal(Outcome.Tested, here.Outcome);
        Close.To(here.Statistic, far.Statistic, 1e-12);
        Close.To(here.DenominatorDegreesOfFreedom, far.DenominatorDegreesOfFreedom, 1e-10);
    }

    [Fact]
    public void P_is_below_one_minus_confidence_exactly_when_the_interval_excludes_zero() =>
        Gen.Select(VisitTable.Gappy(6, 12, 3, 3), Gen.Enum<Sides>()).Sample((table, sides) =>
        {
            var options = new TestOptions { Sides = sides, Confidence = 0.9 };
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var fit = MixedModel.Fit(table.Sample(), VisitTerm.Means, frame);
            var result = MixedModel.Trend(fit, options, scratch);
            if (result.Outcome != Outcome.Tested)
                return;
            Assert.InRange(result.P.Value, 0, 1);
            Assert.Equal(result.P.Value < 0.1, !result.Interval.Contains(0));
        }, iter: 300);

    [Fact]
    public void A_covariate_that_repeats_the_design_is_named_collinear()
    {
        double[] values = [1, 2.5, 3, 2, 2.75, 4.5, 1.5, 3, 3.25, 0.5, 2, 2.5];
        double[] visits = [.. Enumerable.Range(0, 12).Select(at => 5.0 + at % 3)];
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var fit = MixedModel.Fit(VisitSample.Of(values, [0, 1, 2]).WithCovariates(visits, 1), VisitTerm.Means, frame);
        Assert.Equal(Outcome.Collinear, fit.Outcome);
        Assert.Equal(Outcome.Collinear, MixedModel.Omnibus(fit, Options, scratch).Outcome);
        Assert.True(MixedModel.Trend(fit, Options, scratch).P.IsMissing);
    }

    [Fact]
    public void Values_that_are_subject_plus_visit_have_no_variation_to_test_against()
    {
        double[] values = [0.1, 0.3, 0.7, 1.1, 1.3, 1.7, 5.1, 5.3, 5.7];
        Assert.Equal(Outcome.NoVariation, MixedModel.Run(VisitSample.Of(values, [0, 1, 2]), Options, new Scratch()).Outcome);
    }

    [Fact]
    public void Too_little_data_is_said_to_be_too_little()
    {
        double missing = double.NaN;
        Assert.Equal(Outcome.TooFewSets, MixedModel.Run(VisitSample.Of([1, 2, 3], [0, 1, 2]), Options, new Scratch()).Outcome);
        Assert.Equal(Outcome.TooFewSets, MixedModel.Run(VisitSample.Of([1, missing, missing, 2, 3, missing], [0, 1]), Options, new Scratch()).Outcome);
        Assert.Equal(Outcome.TooFewSets, MixedModel.Run(VisitSample.Of([missing, missing], [0, 1]), Options, new Scratch()).Outcome);
    }

    [Fact]
    public void An_endpoint_allocates_nothing()
    {
        var random = new Random(3);
        double[] values = [.. Enumerable.Range(0, 120).Select(at => at % 17 == 0 ? double.NaN : random.NextDouble() + at / 4)];
        var scratch = new Scratch();
        Assert.Equal(0, Allocated.Least(() => Analyse(values, scratch)));
    }

    private static void Analyse(double[] values, Scratch scratch)
    {
        using var frame = scratch.Open();
        var sample = VisitSample.Of(values, 4, frame);
        var fit = MixedModel.Fit(sample, VisitTerm.Means, frame);
        MixedModel.Omnibus(fit, Options, scratch);
        MixedModel.Difference(fit, 3, 0, Options, scratch);
        MixedModel.Trend(fit, Options, scratch);
        VarianceRatioInterval.OfIntraclassCorrelation(fit, 0.95, scratch);
        RepeatedMeasuresAnova.GreenhouseGeisser(sample, Options, scratch);
        Friedman.Run(sample, Options, scratch);
        PageTrend.Run(sample, Options, scratch);
        LinearTrend.Run(sample, Options, scratch);
    }

    private static double Squares(double[] values) => values.Sum(value => (value - values.Average()) * (value - values.Average()));
}
