using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Reference.Tests;

/// <summary>
/// Random-intercept models by restricted maximum likelihood. Values: direct profile likelihood in 60-digit arithmetic
/// (mpmath), confirmed by base R packages nlme 3.1-162 and lme4 1.1-31; degrees of freedom and p named lme_ are nlme's.
/// </summary>
public class MixedModelTests
{
    internal static readonly HashSet<int> DroppedRows = [3, 10, 17, 18, 40, 55, 77, 90, 101];

    [Fact]
    public void Orthodont_visits_as_categories_give_every_number_of_the_reference() =>
        CheckMeans("orthodont", VisitTables.Orthodont(), ["visit10", "visit12", "visit14"]);

    [Fact]
    public void Orthodont_with_nine_rows_missing_gives_every_number_of_the_reference() =>
        CheckMeans("orthodont_9rows_dropped", VisitTables.Orthodont(DroppedRows), ["visit10", "visit12", "visit14"]);

    [Fact]
    public void Sleep_study_with_ten_visits_gives_every_number_of_the_reference() =>
        CheckMeans("sleepstudy", VisitTables.SleepStudy(), [.. Enumerable.Range(1, 9).Select(day => $"visit{day}")]);

    [Fact]
    public void Ergo_stool_gives_every_number_of_the_reference() =>
        CheckMeans("ergostool", VisitTables.ErgoStool(), ["visitT2", "visitT3", "visitT4"]);

    [Theory]
    [InlineData("orthodont", "age")]
    [InlineData("sleepstudy", "days")]
    public void A_line_in_time_gives_every_number_of_the_reference(string dataset, string time)
    {
        var table = dataset == "orthodont" ? VisitTables.Orthodont() : VisitTables.SleepStudy();
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var fit = MixedModel.Fit(table.Sample(), VisitTerm.Line, frame);
        const string Case = "lmm_random_intercept";
        int count = CheckFit(fit, dataset, Case);
        count += CheckEffect(fit, [1, -fit.ColumnMeans[0]], dataset, Case, "(Intercept)", scratch);
        count += CheckEffect(fit, [0, 1], dataset, Case, time, scratch);
        Assert.Equal(15, count);
    }

    [Fact]
    public void Orthodont_line_with_sex_and_its_interaction_gives_every_number_of_the_reference()
    {
        var table = VisitTables.Orthodont();
        var raw = Expected.Table("orthodont");
        string[] subjects = raw.Texts("subject"), sexes = raw.Texts("sex");
        double[] covariates = [.. table.Subjects.SelectMany(subject =>
        {
            double male = sexes[Array.IndexOf(subjects, subject)] == "Male" ? 1 : 0;
            return table.Times.SelectMany(age => new[] { male, age * male });
        })];
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var fit = MixedModel.Fit(table.Sample().WithCovariates(covariates, 2), VisitTerm.Line, frame);
        const string Dataset = "orthodont_sex", Case = "lmm_random_intercept";
        var means = fit.ColumnMeans;
        int count = CheckFit(fit, Dataset, Case);
        count += CheckEffect(fit, [1, -means[0], -means[1], -means[2]], Dataset, Case, "(Intercept)", scratch);
        count += CheckEffect(fit, [0, 1], Dataset, Case, "age", scratch);
        count += CheckEffect(fit, [0, 0, 1], Dataset, Case, "male", scratch);
        count += CheckEffect(fit, [0, 0, 0, 1], Dataset, Case, "age:male", scratch);
        Assert.Equal(25, count);
    }

    [Fact]
    public void Shrout_and_Fleiss_1979_ratings_give_ICC_3_1_and_its_exact_interval()
    {
        var table = VisitTables.Wide("shrout_fleiss", "judge1", "judge2", "judge3", "judge4");
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var fit = MixedModel.Fit(table.Sample(), VisitTerm.Means, frame);
        var interval = VarianceRatioInterval.OfIntraclassCorrelation(fit, 0.95, scratch);
        Expected.Check(fit.IntraclassCorrelation, "shrout_fleiss", "icc", "icc_3_1");
        Expected.Check(interval.Low, "shrout_fleiss", "icc", "icc_3_1_ci95_lo");
        Expected.Check(interval.High, "shrout_fleiss", "icc", "icc_3_1_ci95_hi");
    }

    /// <summary>
    /// Base R 4.2.2: dense covariance matrices, likelihood maximised by Newton's steps, Hessian and gradients by Richardson
    /// extrapolation of central differences; good to about 7 digits.
    /// </summary>
    [Fact]
    public void Satterthwaite_degrees_of_freedom_of_unbalanced_data_are_those_of_numerical_derivatives_in_base_R()
    {
        double[] invented =
        [
            5.1, 6.3, 7.2, 4.0, double.NaN, 6.6, 6.2, 6.9, 8.8, double.NaN, 5.5, double.NaN,
            3.9, 5.6, double.NaN, 7.1, 7.4, 9.9, double.NaN, double.NaN, 6.1,
        ];
        CheckDegrees(VisitTables.Orthodont(DroppedRows).Sample(), [69.0640238187, 69.3385423329, 69.1624423782], 48.0960783213, 69.3449084917, 69.1541889083);
        CheckDegrees(VisitSample.Of(invented, [0, 1, 2]), [6.34104645130, 6.34104645130], 7.48866985973, 6.34104645130, 6.40415537202);
    }

    private static void CheckDegrees(in VisitSample sample, double[] againstFirst, double first, double trend, double omnibus)
    {
        const double Digits = 1e-6;
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var fit = MixedModel.Fit(sample, VisitTerm.Means, frame);
        for (int j = 0; j < againstFirst.Length; j++)
            Assert.Equal(1, MixedModel.Difference(fit, j + 1, 0, TestOptions.Default, scratch).DegreesOfFreedom / againstFirst[j], Digits);
        Assert.Equal(1, MixedModel.Contrast(fit, [1], TestOptions.Default, scratch).DegreesOfFreedom / first, Digits);
        Assert.Equal(1, MixedModel.Trend(fit, TestOptions.Default, scratch).DegreesOfFreedom / trend, Digits);
        Assert.Equal(1, MixedModel.Omnibus(fit, TestOptions.Default, scratch).DenominatorDegreesOfFreedom / omnibus, Digits);
    }

    private static void CheckMeans(string dataset, VisitTables table, string[] names)
    {
        const string Case = "lmm_visit_factor";
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var fit = MixedModel.Fit(table.Sample(), VisitTerm.Means, frame);
        int count = CheckFit(fit, dataset, Case);
        count += CheckEffect(fit, [1], dataset, Case, "(Intercept)", scratch);
        for (int j = 0; j < names.Length; j++)
        {
            double[] weights = new double[j + 2];
            (weights[0], weights[j + 1]) = (-1, 1);
            count += CheckEffect(fit, weights, dataset, Case, names[j], scratch);
        }

        // The reference's second degrees of freedom are those of the containment rule; F itself does not depend on them.
        var omnibus = MixedModel.Run(table.Sample(), TestOptions.Default, scratch);
        Expected.Check(omnibus.Statistic, dataset, Case, "F_visit");
        Expected.Check(omnibus.DegreesOfFreedom, dataset, Case, "F_visit_df1");
        int containment = fit.Observations - fit.Subjects - (table.Visits - 1);
        Expected.Check(containment, dataset, Case, "F_visit_df2");
        Expected.Check(FisherF.UpperTail(omnibus.Statistic, table.Visits - 1, containment).Value, dataset, Case, "F_visit_p");
        Assert.Equal(5 * (names.Length + 1) + 9, count + 4);
    }

    private static int CheckFit(in MixedModelFit fit, string dataset, string @case)
    {
        Expected.Check(fit.VarianceBetween, dataset, @case, "var_subject");
        Expected.Check(fit.VarianceWithin, dataset, @case, "var_resid");
        Expected.Check(fit.RestrictedLogLikelihood, dataset, @case, "loglik_reml");
        Expected.Check(fit.Observations, dataset, @case, "n_obs");
        Expected.Check(fit.Subjects, dataset, @case, "n_subjects");
        Assert.True(Math.Abs(fit.Score) < 1e-10, $"score {fit.Score}");
        return 5;
    }

    private static int CheckEffect(in MixedModelFit fit, double[] weights, string dataset, string @case, string name, Scratch scratch)
    {
        var result = MixedModel.Contrast(fit, weights, TestOptions.Default, scratch);
        Expected.Check(result.Estimate, dataset, @case, "coef." + name);
        Expected.Check(result.StandardError, dataset, @case, "se." + name);
        Expected.Check(result.Statistic, dataset, @case, "t." + name);
        double df = Expected.Value(dataset, @case, "lme_df." + name);
        var tail = StudentT.UpperTail(Math.Abs(result.Statistic), df);
        // That p was computed from nlme's own t, which is only as good as the agreement of the sources on t.
        double ofT = Expected.Tolerance(dataset, @case, "t." + name);
        Expected.Check(2 * tail.Value, dataset, @case, "lme_p." + name, atLeast: (df + 1) * ofT);
        return 5;
    }
}
