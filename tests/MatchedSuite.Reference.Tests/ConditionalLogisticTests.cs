using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Reference.Tests;

/// <summary>
/// Exact conditional likelihood on infertility after abortion (Trichopoulos et al. 1976, 1:2) and endometrial cancer
/// (Mack et al. 1976; Breslow and Day 1980, 1:4 and 1:1). Values: subset enumeration at 50 digits and the exact fit of R,
/// both in Inputs/README.md.
/// </summary>
public class ConditionalLogisticTests
{
    // The stopping rule leaves about 1e-12 of a standard error. Likelihood-ratio p-values carry the rounding of a difference of
    // log-likelihoods, about 1e-14 of their size, which a far tail multiplies.
    private const double Promised = 1e-11;

    [Theory]
    [InlineData("infert", "clogit", "spontaneous", "induced")]
    [InlineData("infert", "clogit", "induced", "spontaneous")]
    [InlineData("infert", "clogit_spontaneous", "spontaneous")]
    [InlineData("infert", "clogit_induced", "induced")]
    [InlineData("bdendo", "clogit_est", "est")]
    [InlineData("bdendo", "clogit_gall", "gall")]
    [InlineData("bdendo", "clogit_hyp", "hyp")]
    [InlineData("bdendo", "clogit_non", "non")]
    [InlineData("bdendo", "clogit_est_gall", "est", "gall")]
    [InlineData("bdendo", "clogit_est_gall", "gall", "est")]
    [InlineData("bdendo", "clogit_four", "gall", "hyp", "est", "non")]
    [InlineData("bdendo", "clogit_four", "non", "gall", "hyp", "est")]
    [InlineData("bdendo", "clogit_ob_missing_dropped", "ob")]
    [InlineData("bdendo11", "clogit_est", "est")]
    [InlineData("bdendo11", "clogit_gall", "gall")]
    [InlineData("bdendo11", "clogit_hyp", "hyp")]
    public void Every_quantity_of_the_fit_agrees(string dataset, string @case, string endpoint, params string[] covariates)
    {
        var scratch = new Scratch();
        using Scratch.Frame frame = scratch.Open();
        SetSample sets = ReferenceSets.Of(dataset, endpoint, frame, covariates);
        var coefficients = new double[covariates.Length + 1];
        var errors = new double[covariates.Length + 1];
        ConditionalLogisticFit fit = ConditionalLogistic.Fit(sets, TestOptions.Default, scratch, coefficients, errors);
        TestResult result = ConditionalLogistic.Run(sets, TestOptions.Default, scratch);
        int made = 0;

        Check(fit.NullLogLikelihood, "loglik_null");
        Check(fit.LogLikelihood, "loglik");
        Check(fit.OverallLikelihoodRatio.Statistic, "lr_chi2");
        Check(fit.OverallLikelihoodRatio.DegreesOfFreedom, "lr_df");
        Check(fit.OverallLikelihoodRatio.P.Value, "lr_p");
        Check(fit.OverallWald.Statistic, "wald_chi2");
        Check(fit.OverallWald.P.Value, "wald_p");
        Check(fit.OverallScore.Statistic, "score_chi2");
        Check(fit.OverallScore.P.Value, "score_p");
        Check(fit.Sets, "n_informative_sets");
        Check(fit.Samples + sets.Lost.MembersOfLostSets, "n_used");
        Check(sets.IndexCounts.ToArray().Sum(), "n_events");
        Check(result.Estimate, "coef." + endpoint);
        Check(result.StandardError, "se." + endpoint);
        Check(result.Statistic, "z." + endpoint);
        Check(result.P.Value, "p." + endpoint);
        Check(Math.Exp(result.Estimate), "or." + endpoint);
        Check(Math.Exp(result.Interval.Low), "or95_lo." + endpoint);
        Check(Math.Exp(result.Interval.High), "or95_hi." + endpoint);
        for (int c = 0; c < covariates.Length; c++)
        {
            Check(coefficients[c], "coef." + covariates[c]);
            Check(errors[c], "se." + covariates[c]);
        }

        Assert.Equal(19 + (2 * covariates.Length), made);

        void Check(double actual, string quantity)
        {
            Expected.Check(actual, dataset, @case, quantity, atLeast: Promised);
            made++;
        }
    }

    [Theory]
    [InlineData("approval_2x2")]
    [InlineData("hodgkin_2x2")]
    [InlineData("endometrial_1to1_est")]
    [InlineData("equal_discordant")]
    public void Discordant_pairs_give_the_matched_odds_ratio_and_McNemars_statistic_as_score_test(string dataset)
    {
        var scratch = new Scratch();
        using Scratch.Frame frame = scratch.Open();
        SetSample sets = ReferenceSets.OfDiscordantPairs(dataset, frame);
        ConditionalLogisticFit fit = ConditionalLogistic.Fit(sets, TestOptions.Default, scratch);
        Expected.Check(Math.Exp(fit.Estimate), dataset, "matched_or", "or");
        Expected.Check(Math.Exp(fit.Interval.Low), dataset, "matched_or", "wald95_lo", Promised);
        Expected.Check(Math.Exp(fit.Interval.High), dataset, "matched_or", "wald95_hi", Promised);
        Expected.Check(fit.Score.Statistic, dataset, "mcnemar", "chi2");
        Expected.Check(fit.Score.P.Value, dataset, "mcnemar", "p_chi2");
    }

    [Fact]
    public void A_single_discordant_pair_separates_the_roles()
    {
        var scratch = new Scratch();
        using Scratch.Frame frame = scratch.Open();
        ConditionalLogisticFit fit = ConditionalLogistic.Fit(ReferenceSets.OfDiscordantPairs("zero_cell", frame), TestOptions.Default, scratch);
        Expected.Check(Math.Exp(fit.Estimate), "zero_cell", "matched_or", "or");
        Assert.Equal((Remarks.Separated, double.NegativeInfinity), (fit.Remarks, fit.Interval.Low));
    }

    [Fact]
    public void Profile_limits_and_the_likelihood_ratio_given_a_covariate_agree_with_enumeration_at_30_digits()
    {
        // mpmath 1.2.1: Newton on the likelihood with every subset listed, limits by root finding on the profile.
        var scratch = new Scratch();
        using Scratch.Frame frame = scratch.Open();
        SetSample sets = ReferenceSets.Of("infert", "spontaneous", frame, "induced");
        ConditionalLogisticFit fit = ConditionalLogistic.Fit(sets, TestOptions.Default, scratch);
        Interval profile = ConditionalLogistic.ProfileInterval(sets, TestOptions.Default, scratch);
        Assert.Equal(1.352770285, profile.Low, 5e-10);
        Assert.Equal(2.747328718, profile.High, 5e-10);
        Assert.Equal(-90.7177701233, fit.LogLikelihoodOfCovariates, 5e-11);
        Assert.Equal(53.0310664, fit.LikelihoodRatio.Statistic, 5e-8);
        Assert.Equal(3.283144453e-13, fit.LikelihoodRatio.P.Value, 5e-23);
    }

    [Fact]
    public void Levels_and_trend_agree_with_enumeration_at_30_digits()
    {
        var scratch = new Scratch();
        using Scratch.Frame frame = scratch.Open();
        SetSample sets = ReferenceSets.Of("bdendo", "dur", frame);
        double[] odds = new double[4], errors = new double[4];
        ConditionalLogisticCategories.Fit(sets, [0, 1, 2, 3, 4], TestOptions.Default, scratch, odds, errors);
        TestResult omnibus = ConditionalLogisticCategories.Run(sets, [0, 1, 2, 3, 4], TestOptions.Default, scratch);
        TestResult trend = ConditionalLogistic.Run(sets, TestOptions.Default, scratch);
        double[] expected = [2.66468639, 4.175853175, 8.134479282, 10.40943486];
        for (int level = 0; level < 4; level++)
            Assert.Equal(expected[level], Math.Exp(odds[level]), 5e-9);
        Assert.Equal(34.55887075, omnibus.Statistic, 5e-9);
        Assert.Equal(4, omnibus.DegreesOfFreedom);
        Assert.Equal(5.722678441e-7, omnibus.P.Value, 5e-16);
        Assert.Equal(0.5930071384, trend.Estimate, 5e-11);
        Assert.Equal(1.086052258e-7, trend.P.Value, 5e-17);
    }
}
