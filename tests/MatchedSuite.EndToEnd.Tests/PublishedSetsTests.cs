using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>
/// Infertility after abortion (Trichopoulos et al. 1976, 1:2) and endometrial cancer (Mack et al. 1976, 1:4) as studies through the
/// executable; values by subset enumeration at 50 digits and by R, see Inputs/README.md of the reference tests.
/// </summary>
public sealed class PublishedSetsTests : IDisposable
{
    private const double Tolerance = 1e-11;
    private readonly StudyFolder _folder = new();

    public void Dispose() => _folder.Dispose();

    [Theory]
    [InlineData("spontaneous", "induced")]
    [InlineData("induced", "spontaneous")]
    public void Infertility_adjusted_for_the_other_kind_of_abortion(string endpoint, string covariate)
    {
        ResultsTable results = Analyse("infert", $"covariates: [{covariate}]", $"kind: count, include: [{endpoint}]", "count: [conditional-logistic], intervals: [profile]");
        DetailsTable details = DetailsTable.Read(_folder.At("results/details.parquet"));
        CheckLogistic(results, "infert", "clogit", endpoint);
        Assert.Equal("248", results.Text(endpoint, "conditional-logistic", "n_samples"));
        Close("infert", "clogit", "loglik", details[endpoint, "conditional-logistic", "log-likelihood"]);
        if (endpoint != "spontaneous")
            return;

        // mpmath 1.2.1, every subset listed: docs/methods/conditional-logistic.md.
        Assert.Equal(-90.7177701233, details[endpoint, "conditional-logistic", "log-likelihood-without"], 5e-11);
        Assert.Equal(53.0310664, details[endpoint, "conditional-logistic", "likelihood-ratio"], 5e-8);
        Assert.Equal(3.283144453e-13, details[endpoint, "conditional-logistic", "likelihood-ratio-p"], 5e-22);
        Assert.Equal(Math.Log10(3.283144453e-13), details[endpoint, "conditional-logistic", "likelihood-ratio-log10-p"], 1e-9);
        Assert.Equal(1.352770285, details[endpoint, "conditional-logistic", "profile-low"], 5e-10);
        Assert.Equal(2.747328718, details[endpoint, "conditional-logistic", "profile-high"], 5e-10);
    }

    [Fact]
    public void Endometrial_cancer_and_signs_by_two_methods()
    {
        ResultsTable results = Analyse(
            "bdendo", "match-on: [{column: age, within: 5}]", "kind: binary, include: [est, gall, hyp, non, ob]", "binary: [conditional-logistic, mantel-haenszel]");
        DetailsTable details = DetailsTable.Read(_folder.At("results/details.parquet"));
        foreach (string endpoint in (string[])["est", "gall", "hyp", "non"])
        {
            CheckLogistic(results, "bdendo", "clogit_" + endpoint, endpoint);
            Close("bdendo", "clogit_" + endpoint, "loglik", details[endpoint, "conditional-logistic", "log-likelihood"]);
            Close("bdendo", "clogit_" + endpoint, "lr_p", details[endpoint, "conditional-logistic", "likelihood-ratio-p"]);
            Close("bdendo", "clogit_" + endpoint, "score_chi2", details[endpoint, "conditional-logistic", "score"]);
            Close("bdendo", "clogit_" + endpoint, "score_p", details[endpoint, "conditional-logistic", "score-p"]);
            Assert.False(details.Has(endpoint, "conditional-logistic", "profile-low"));
        }

        CheckLogistic(results, "bdendo", "clogit_ob_missing_dropped", "ob");
        Assert.Equal("57", results.Text("ob", "conditional-logistic", "n_sets"));
        Assert.Equal("6", results.Text("ob", "conditional-logistic", "n_missing"));
        foreach (string endpoint in (string[])["est", "gall", "hyp"])
        {
            string @case = "matched_mantel_haenszel_" + endpoint;
            Close("bdendo", @case, "or", results.Number(endpoint, "mantel-haenszel", "ratio"));
            Close("bdendo", @case, "chi2", results.Number(endpoint, "mantel-haenszel", "statistic"));
            Close("bdendo", @case, "p", results.Number(endpoint, "mantel-haenszel", "p_value"));
            Close("bdendo", @case, "rbg95_lo", results.Number(endpoint, "mantel-haenszel", "ratio_low"));
        }
    }

    [Fact]
    public void Ordered_levels_have_a_trend_and_an_omnibus_test_as_categories()
    {
        ResultsTable results = Analyse("bdendo", "replicates: refuse", "kind: ordinal, include: [dur, est]", "ordinal: [conditional-logistic, aligned-rank]");
        DetailsTable details = DetailsTable.Read(_folder.At("results/details.parquet"));

        // mpmath 1.2.1, every subset listed; base R 4.2.2 for the ranks: docs/methods.
        Assert.Equal(0.5930071384, results.Number("dur", "conditional-logistic", "estimate"), 5e-11);
        Assert.Equal(1.086052258e-7, results.Number("dur", "conditional-logistic", "p_value"), 5e-17);
        Assert.Equal(34.55887075, details["dur", "conditional-logistic", "categories-likelihood-ratio"], 5e-9);
        Assert.Equal(4, details["dur", "conditional-logistic", "categories-df"]);
        Assert.Equal(5.722678441e-7, details["dur", "conditional-logistic", "categories-p"], 5e-16);
        Assert.Equal(3.36549137174297e-08, results.Number("dur", "aligned-rank", "p_value"), 1e-18);
        Assert.False(details.Has("est", "conditional-logistic", "categories-p"));
    }

    [Fact]
    public void Age_at_diagnosis_by_a_linear_model_within_sets()
    {
        ResultsTable results = Analyse("bdendo", "replicates: refuse", "include: [age]", "continuous: [within-set-linear, within-set-robust]");
        const string Case = "within_set_lm_age_on_case";
        Close("bdendo", Case, "coef", results.Number("age", "within-set-linear", "estimate"));
        Close("bdendo", Case, "se", results.Number("age", "within-set-linear", "standard_error"));
        Close("bdendo", Case, "t", results.Number("age", "within-set-linear", "statistic"));
        Close("bdendo", Case, "df", results.Number("age", "within-set-linear", "df"));
        Close("bdendo", Case, "p", results.Number("age", "within-set-linear", "p_value"));
        Assert.Equal("62", results.Text("age", "within-set-robust", "df"));
    }

    private static void CheckLogistic(ResultsTable results, string dataset, string @case, string endpoint)
    {
        const string Method = "conditional-logistic";
        Close(dataset, @case, "coef." + endpoint, results.Number(endpoint, Method, "estimate"));
        Close(dataset, @case, "se." + endpoint, results.Number(endpoint, Method, "standard_error"));
        Close(dataset, @case, "z." + endpoint, results.Number(endpoint, Method, "statistic"));
        Close(dataset, @case, "p." + endpoint, results.Number(endpoint, Method, "p_value"));
        Close(dataset, @case, "or." + endpoint, results.Number(endpoint, Method, "ratio"));
        Close(dataset, @case, "or95_lo." + endpoint, results.Number(endpoint, Method, "ratio_low"));
        Close(dataset, @case, "or95_hi." + endpoint, results.Number(endpoint, Method, "ratio_high"));
    }

    private ResultsTable Analyse(string dataset, string design, string endpoints, string analysis)
    {
        File.Copy(ReferenceValues.File(dataset + ".csv"), _folder.At(dataset + ".csv"));
        _folder.Write(
            "study.yaml",
            $$"""
            schema: 1
            study: {name: {{dataset}}}
            data: {samples: {{dataset}}.csv}
            design:
              kind: sets
              set: set
              role: {column: case, index: 1, reference: 0}
              {{design}}
            endpoints: { {{endpoints}} }
            analysis: { {{analysis}} }
            output: {folder: results}
            """);
        Finished run = _folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        return _folder.Results();
    }

    private static void Close(string dataset, string @case, string quantity, double found)
    {
        double expected = ReferenceValues.Of(dataset, @case, quantity);
        Assert.True(Math.Abs(found - expected) <= Tolerance * Math.Abs(expected), $"{@case} {quantity}: expected {expected:R}, found {found:R}");
    }
}
