using CsCheck;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Statistics.Tests.Sets;

public class SeparationTests
{
    private static readonly double[] Leads = [0.5, 1, 1.5, 2, 2.5, 3];

    [Fact]
    public void Where_every_index_member_leads_the_estimate_is_infinite_and_the_rest_comes_from_the_likelihood()
    {
        DrawnSets sets = Pairs(Leads);
        TestResult result = sets.Run(ConditionalLogistic.Run);
        Assert.Equal((double.PositiveInfinity, double.PositiveInfinity), (result.Estimate, result.Interval.High));
        Assert.True(double.IsNaN(result.StandardError));
        Assert.Equal(Remarks.Separated, result.Remarks);
        Assert.Equal(Math.Sqrt(12 * Math.Log(2)), result.Statistic, 1e-12); // the likelihood rises from 2^-6 to 1
        Assert.Equal(-3.841458820694124 / 2, -Leads.Sum(d => Math.Log(1 + Math.Exp(-result.Interval.Low * d))), 1e-9);
    }

    [Fact]
    public void Where_every_index_member_trails_all_is_mirrored()
    {
        TestResult above = Pairs(Leads).Run(ConditionalLogistic.Run);
        TestResult below = Pairs([.. Leads.Select(d => -d)]).Run(ConditionalLogistic.Run);
        Assert.Equal((double.NegativeInfinity, double.NegativeInfinity), (below.Estimate, below.Interval.Low));
        Assert.Equal(-above.Interval.Low, below.Interval.High, 1e-12);
        Assert.Equal(above.P.Value, below.P.Value, 1e-15);
    }

    [Fact]
    public void A_level_pair_keeps_its_half_of_the_likelihood() =>
        Assert.Equal(-Math.Log(2), Pairs([.. Leads, 0]).Fit().LogLikelihood, 1e-14);

    [Fact]
    public void Separation_is_reported_exactly_where_one_role_never_stands_above_the_other_within_a_set() =>
        DrawnSets.AnyShape(1, 3).Sample(sets =>
        {
            ConditionalLogisticFit fit = sets.Fit();
            if (fit.Outcome != Outcome.Tested)
                return;
            bool leads = Enumerable.Range(0, sets.Count).All(s => sets.Split(s).Index.Min() >= sets.Split(s).Reference.Max());
            bool trails = Enumerable.Range(0, sets.Count).All(s => sets.Split(s).Index.Max() <= sets.Split(s).Reference.Min());
            Assert.Equal(leads || trails, fit.Remarks.HasFlag(Remarks.Separated));
            Assert.Equal(leads || trails, double.IsInfinity(fit.Estimate));
            if (!leads && !trails)
                return;
            double limit = EnumeratedLikelihood.Evaluate(sets, [leads ? 200 : -200]).LogLikelihood; // values differ by tenths
            Assert.Equal(limit, fit.LogLikelihood, 1e-7);
        });

    [Fact]
    public void Separation_by_endpoint_and_covariate_together_is_found()
    {
        // Endpoint plus twice the covariate leads in every pair, neither does alone.
        DrawnSets sets = Pairs([1, -0.5, 2, -1, 0.3], [0.2, 1, -0.7, 2, 0.1]);
        ConditionalLogisticFit fit = sets.Fit();
        Assert.Equal((Remarks.Separated, double.PositiveInfinity), (fit.Remarks, fit.Estimate));
        Assert.Equal(0, fit.LogLikelihood, 1e-8);
        Assert.True(double.IsFinite(fit.Interval.Low) && double.IsPositiveInfinity(fit.Interval.High));
    }

    [Fact]
    public void A_covariate_that_separates_leaves_the_endpoint_the_pairs_in_which_it_is_level()
    {
        DrawnSets sets = Pairs([1, -0.5, 2, -1, 0.3, 0.7, -0.4], [1, 2, 0, 0, 0, 0, 0]);
        ConditionalLogisticFit fit = sets.Fit(), level = Pairs([2, -1, 0.3, 0.7, -0.4]).Fit();
        Assert.Equal(Remarks.Separated, fit.Remarks);
        Assert.Equal(level.Estimate, fit.Estimate, 1e-7);
        Assert.Equal(level.StandardError, fit.StandardError, 1e-6);
        Assert.Equal(level.LikelihoodRatio.Statistic, fit.LikelihoodRatio.Statistic, 1e-7);
    }

    [Fact]
    public void A_covariate_that_follows_from_others_or_from_the_sets_is_named_and_left_out()
    {
        double[] endpoint = [1, -0.5, 2, -1, 0.3, 0.7, -0.4], covariate = [0.2, 1, -0.7, 0.4, 0.1, -0.6, -0.3];
        ConditionalLogisticFit alone = Pairs(endpoint, covariate).Fit();
        ConditionalLogisticFit repeated = Pairs(endpoint, covariate, [.. covariate.Select(d => -2 * d)]).Fit();
        ConditionalLogisticFit level = Pairs(endpoint, new double[7], covariate).Fit();
        Assert.Equal(-1, alone.CollinearCovariate);
        Assert.Equal((1, Remarks.CollinearCovariate), (repeated.CollinearCovariate, repeated.Remarks));
        Assert.Equal(alone.Estimate, repeated.Estimate, 1e-10);
        Assert.Equal((0, Remarks.CollinearCovariate), (level.CollinearCovariate, level.Remarks));
        Assert.Equal(alone.Estimate, level.Estimate, 1e-10);
        Assert.Equal(alone.LikelihoodRatio.Statistic, level.LikelihoodRatio.Statistic, 1e-10);
    }

    [Fact]
    public void An_endpoint_that_follows_from_the_covariates_is_not_tested()
    {
        double[] covariate = [0.2, 1, -0.7, 0.4, 0.1, -0.6, -0.3];
        TestResult result = Pairs([.. covariate.Select(d => 3 * d)], covariate).Run(ConditionalLogistic.Run);
        Assert.Equal((Outcome.Collinear, Remarks.Collinear), (result.Outcome, result.Remarks));
        Assert.True(result.P.IsMissing);
    }

    [Fact]
    public void Small_samples_with_covariates_coarse_values_and_outliers_are_settled() =>
        DrawnSets.AnyShape(8, 25, covariates: 2).SelectMany(sets => Gen.Int[0, 2], (sets, kind) => (sets, kind)).Sample(draw =>
        {
            // Yes/no values separate often; tangents have outliers a hundred times and more their spread.
            Func<double, double> change = draw.kind switch
            {
                0 => value => value > 0 ? 1 : 0,
                1 => value => Math.Round(value / 2),
                _ => value => Math.Tan(value * Math.PI / 8.2),
            };
            DrawnSets sets = draw.sets.With(change) with { Covariates = Array.ConvertAll(draw.sets.Covariates, value => change(value)) };
            ConditionalLogisticFit fit = sets.Fit();
            Assert.False(fit.Remarks.HasFlag(Remarks.NotConverged) || fit.Outcome == Outcome.NotConverged);
            if (fit.Outcome != Outcome.Tested)
                return;
            Assert.True(fit.Interval.Low <= fit.Estimate && fit.Estimate <= fit.Interval.High);
            Assert.True(fit.LogLikelihood >= fit.LogLikelihoodOfCovariates - 1e-9);
            Assert.True(fit.LogLikelihoodOfCovariates >= fit.NullLogLikelihood - 1e-9);
        });

    // 1:1 sets by their differences, index minus reference: of the endpoint, then of covariates.
    private static DrawnSets Pairs(double[] differences, params double[][] covariates)
    {
        int n = differences.Length;
        return new DrawnSets(
            Members(differences),
            [.. Enumerable.Range(0, n + 1).Select(s => 2 * s)],
            [.. Enumerable.Range(0, 2 * n).Select(i => i % 2 == 0)],
            [.. covariates.SelectMany(Members)]);

        static double[] Members(double[] differences) => [.. differences.SelectMany((d, s) => new[] { s + d, s })];
    }
}
