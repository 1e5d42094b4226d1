using System.Globalization;
using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>What a study of matched sets may ask for, through the executable.</summary>
public sealed class SetStudyTests : IDisposable
{
    private readonly StudyFolder _folder = SmallSets.Folder();

    public void Dispose() => _folder.Dispose();

    [Fact]
    public void A_stratum_is_what_its_sets_alone_give_and_strata_are_compared()
    {
        ResultsTable east = Analyse("samples.csv", SmallSets.Samples.Replace(",west,", ",,", StringComparison.Ordinal), "stratum: town");
        ResultsTable west = Analyse("samples.csv", SmallSets.Samples.Replace(",east,", ",,", StringComparison.Ordinal));
        ResultsTable both = Analyse("samples.csv", SmallSets.Samples);
        foreach (string method in (string[])["conditional-logistic", "within-set-linear", "aligned-rank", "set-relabel"])
        {
            Assert.Equal(east.Text("crp", method, "p_value"), both.Text(Find(both, "crp", method, "east"), "p_value"));
            Assert.Equal(west.Text("crp", method, "ci_low"), both.Text(Find(both, "crp", method, "west"), "ci_low"));
        }

        double first = east.Number("crp", "conditional-logistic", "estimate"), firstError = east.Number("crp", "conditional-logistic", "standard_error");
        double second = west.Number("crp", "conditional-logistic", "estimate"), secondError = west.Number("crp", "conditional-logistic", "standard_error");
        int between = Find(both, "crp", "conditional-logistic", "difference");
        Assert.Equal(first - second, Number(both, between, "estimate"), 1e-12);
        Assert.Equal((first - second) / Math.Sqrt(firstError * firstError + secondError * secondError), Number(both, between, "statistic"), 1e-12);
    }

    [Fact]
    public void Estimates_per_standard_deviation_of_the_controls_rescale_and_change_no_p()
    {
        ResultsTable plain = Analyse();
        Change("analysis:", "endpoints: {scale: sd}\nanalysis:");
        ResultsTable scaled = Analyse();
        double deviation = DetailsTable.Read(_folder.At("results/details.parquet"))["crp", "", "reference-sd"];
        double[] controls = [.. SmallSets.Panel.Split('\n')[1].Split(',').Skip(1)
            .Where((_, sample) => !SmallSets.Panel.Split('\n')[0].Split(',')[sample + 1].EndsWith('a')).Select(cell => double.Parse(cell, CultureInfo.InvariantCulture))];
        double mean = controls.Average();
        Assert.Equal(Math.Sqrt(controls.Sum(value => (value - mean) * (value - mean)) / (controls.Length - 1)), deviation, 1e-12);
        Assert.Equal(plain.Number("crp", "conditional-logistic", "estimate") * deviation, scaled.Number("crp", "conditional-logistic", "estimate"), 1e-10);
        Assert.Equal(plain.Number("crp", "within-set-linear", "estimate") / deviation, scaled.Number("crp", "within-set-linear", "estimate"), 1e-10);
        Assert.Equal(plain.Number("crp", "within-set-linear", "p_value"), scaled.Number("crp", "within-set-linear", "p_value"), 1e-10);
        Assert.Equal(plain.Text("crp", "aligned-rank", "p_value"), scaled.Text("crp", "aligned-rank", "p_value"));
        Assert.Contains("odds ratio per SD", _folder.Read("results/summary.md"), StringComparison.Ordinal);
    }

    [Fact]
    public void Without_spread_among_the_controls_there_is_no_standard_deviation_to_scale_by()
    {
        string[] names = SmallSets.Panel.Split('\n')[0].Split(',');
        _folder.Write("panel.csv", SmallSets.Panel + "flat," + string.Join(',', names.Skip(1).Select((name, i) => name.EndsWith('a') ? $"{i}" : "2")) + "\n");
        Change("analysis:", "endpoints: {scale: sd}\nanalysis:");
        ResultsTable results = Analyse();
        Assert.Equal("", results.Text("flat", "within-set-linear", "p_value"));
        Assert.Equal("no-reference-spread", results.Text("flat", "within-set-linear", "flags"));
        Assert.Equal("12", results.Text("flat", "within-set-linear", "n_sets"));
        Assert.Contains("the values of the reference role do not vary", _folder.Read("results/audit/untested.csv"), StringComparison.Ordinal);
    }

    [Fact]
    public void A_member_without_the_value_leaves_its_set_and_a_set_without_a_role_leaves()
    {
        // Of s1 (1:2) a control; of s2 (1:3) the case; of s3 (1:1) the only control.
        string[] names = SmallSets.Panel.Split('\n')[0].Split(',');
        string crp = string.Join(',', SmallSets.Panel.Split('\n')[1].Split(',').Select((cell, i) => names[i] is "s1b" or "s2a" or "s3b" ? "NA" : cell));
        ResultsTable whole = Analyse();
        ResultsTable results = Analyse("panel.csv", SmallSets.Panel.Replace(SmallSets.Panel.Split('\n')[1], crp, StringComparison.Ordinal));
        Assert.Equal("10", results.Text("crp", "conditional-logistic", "n_sets"));
        Assert.Equal("2", results.Text("crp", "conditional-logistic", "n_missing"));
        int samples = (int)whole.Number("crp", "conditional-logistic", "n_samples");
        Assert.Equal(samples - 1 - 4 - 2, results.Number("crp", "conditional-logistic", "n_samples"));
        Assert.Equal(whole.Text("il6", "conditional-logistic", "p_value"), results.Text("il6", "conditional-logistic", "p_value"));
        Assert.Contains("A member without the value leaves its set", _folder.Read("results/summary.md"), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("pairs", "mcnemar-exact")]
    [InlineData("sets", "mantel-haenszel")]
    public void Replicates_that_disagree_on_a_sign_count_as_yes(string kind, string method)
    {
        using StudyFolder folder = StudyFolder.Small();
        folder.Change("study.yaml", "kind: pairs\n  set: pair", $"kind: {kind}\n  set: pair\n  subject: person\n  replicates: mean");
        folder.Change("study.yaml", "analysis: {continuous: [paired-t, signed-rank]", $"endpoints: {{kind: binary}}\nanalysis: {{binary: [{method}]");
        folder.Write("samples.csv", "person," + SmallStudy.Samples.Replace("\ns", "\np", StringComparison.Ordinal).Split('\n')[0] + "\n"
            + string.Concat(SmallStudy.Samples.Split('\n').Skip(1).Where(line => line.Length > 0).Select(line => $"{line.Split(',')[0]},{line}\n")) + "s1a,s1c,p1,yes\n");
        string header = SmallStudy.Panel.Split('\n')[0] + ",s1c\n";
        folder.Write("panel.csv", header + "sign,1,0,1,0,1,0,1,0,1,0,1,0,0,1,0,0,0\nsure,1,0,1,0,1,0,1,0,1,0,1,0,0,1,0,0,1\n");
        Finished run = folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        Assert.Equal(folder.Results().Text("sure", method, "p_value"), folder.Results().Text("sign", method, "p_value"));
    }

    [Fact]
    public void Controls_that_serve_several_cases_are_flagged_and_told_of()
    {
        ResultsTable results = Analyse("samples.csv", SmallSets.Samples + "s1b,r2,ps1b,control,east,41,no\n", "reuse: allowed");
        Assert.Contains("reused-controls", results.Text("il6", "aligned-rank", "flags"), StringComparison.Ordinal);
        Assert.Contains("1 person serves in several used sets", _folder.Read("results/summary.md"), StringComparison.Ordinal);
        Assert.Contains("the sets are not independent", _folder.Read("results/run.json"), StringComparison.Ordinal);
        Assert.Equal("37", ResultsTable.Read(_folder.At("results/results.csv")).Text("il6", "set-relabel", "n_samples"));
    }

    [Fact]
    public void Covariates_adjust_and_those_fixed_within_sets_are_named()
    {
        ResultsTable plain = Analyse();
        Change("  subject: person\n", "  subject: person\n  covariates: [smoking, town, age]\n");
        Finished run = _folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        ResultsTable adjusted = _folder.Results();
        Assert.Contains("covariate 'town=west' is the same within every set", run.Error, StringComparison.Ordinal);
        Assert.DoesNotContain("'smoking=yes'", run.Error, StringComparison.Ordinal);
        Assert.NotEqual(plain.Text("crp", "conditional-logistic", "estimate"), adjusted.Text("crp", "conditional-logistic", "estimate"));
        Assert.Contains("collinear-covariate", adjusted.Text("crp", "conditional-logistic", "flags"), StringComparison.Ordinal);
        Assert.Contains("unadjusted", adjusted.Text("crp", "aligned-rank", "flags"), StringComparison.Ordinal);
        Assert.Equal(plain.Text("crp", "aligned-rank", "p_value"), adjusted.Text("crp", "aligned-rank", "p_value"));
    }

    [Fact]
    public void Values_below_their_limit_are_counted_and_compared_as_above_and_below()
    {
        _folder.Write("markers.csv", "endpoint,detection_limit\ncrp,3.9\ntnf,0.1\n");
        Change("analysis:", "endpoints: {dictionary: markers.csv, below-limit: limit}\nanalysis:");
        ResultsTable results = Analyse();
        DetailsTable details = DetailsTable.Read(_folder.At("results/details.parquet"));
        Assert.Contains("mostly-below-limit", results.Text("crp", "conditional-logistic", "flags"), StringComparison.Ordinal);
        Assert.Equal("false", results.Text("crp", "mantel-haenszel", "primary"));
        Assert.Equal(0, details["tnf", "", "index-below-limit"]);
        string[] names = SmallSets.Panel.Split('\n')[0].Split(',');
        int below = SmallSets.Panel.Split('\n')[1].Split(',').Where((cell, i) => i > 0 && !names[i].EndsWith('a') && double.Parse(cell, CultureInfo.InvariantCulture) < 3.9).Count();
        Assert.Equal(below, details["crp", "", "reference-below-limit"]);
        Assert.DoesNotContain("mostly-below-limit", results.Text("tnf", "conditional-logistic", "flags"), StringComparison.Ordinal);
    }

    [Fact]
    public void Logarithms_make_odds_ratios_per_doubling_and_pairs_as_sets_agree_with_the_paired_t()
    {
        Change("analysis:", "endpoints: {transform: log2}\nanalysis:");
        Analyse();
        Assert.Contains("odds ratio per doubling", _folder.Read("results/summary.md"), StringComparison.Ordinal);
        using StudyFolder pairs = StudyFolder.Small();
        Assert.Equal(0, pairs.Run("analyze", "study.yaml", "--out", "pairs").ExitCode);
        pairs.Change("study.yaml", "kind: pairs", "kind: sets");
        pairs.Change("study.yaml", "[paired-t, signed-rank]", "[within-set-linear]");
        Assert.Equal(0, pairs.Run("analyze", "study.yaml").ExitCode);
        foreach (string endpoint in (string[])["crp", "il6", "tnf", "alb"])
        {
            Assert.Equal(pairs.Results("pairs").Number(endpoint, "paired-t", "p_value"), pairs.Results().Number(endpoint, "within-set-linear", "p_value"), 1e-13);
            Assert.Equal(pairs.Results("pairs").Text(endpoint, "paired-t", "n_sets"), pairs.Results().Text(endpoint, "within-set-linear", "n_sets"));
        }
    }

    [Fact]
    public void Adjustments_and_their_intervals_apply_to_sets_as_to_pairs()
    {
        Change("adjust: [bonferroni, holm, bh]}", "adjust: [bonferroni, sidak, hommel, bh, two-stage-bh], intervals: [simultaneous, profile]}");
        ResultsTable results = Analyse();
        DetailsTable details = DetailsTable.Read(_folder.At("results/details.parquet"));
        Assert.Equal(3 * results.Number("crp", "conditional-logistic", "p_value"), results.Number("crp", "conditional-logistic", "p_bonferroni"), 1e-15);

        // Of three endpoints at 95 %: the normal quantile of 0.05/6, base R 4.2.2.
        double error = results.Number("crp", "conditional-logistic", "standard_error");
        double estimate = results.Number("crp", "conditional-logistic", "estimate");
        Assert.Equal(estimate + (2.3939797998185104 * error), results.Number("crp", "conditional-logistic", "ci_sim_high"), 1e-8);
        Assert.InRange(details["crp", "conditional-logistic", "profile-high"], estimate, double.MaxValue);
        Assert.Equal("", results.Text("crp", "aligned-rank", "ci_sim_high"));
    }

    [Fact]
    public void Cautions_are_those_of_a_case_control_study()
    {
        Analyse();
        string summary = _folder.Read("results/summary.md");
        Assert.Contains("Odds ratios are within matched sets", summary, StringComparison.Ordinal);
        Assert.Contains("What the sets were matched on cannot be estimated", summary, StringComparison.Ordinal);
        Finished check = _folder.Run("check", "study.yaml");
        Assert.Contains("'case' compared with 'control' within risk_set", check.Output, StringComparison.Ordinal);
    }

    private ResultsTable Analyse() => Analyse("samples.csv", _folder.Read("samples.csv"));

    private ResultsTable Analyse(string file, string text, string design = "")
    {
        _folder.Write(file, text);
        if (design.Length > 0)
            Change("  subject: person\n", $"  subject: person\n  {design}\n");
        Finished run = _folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        return _folder.Results();
    }

    private void Change(string found, string replacement) => _folder.Change("study.yaml", found, replacement);

    private static int Find(ResultsTable results, string endpoint, string method, string stratum) => Enumerable.Range(0, results.Rows).Single(row =>
        results.Text(row, "endpoint") == endpoint && results.Text(row, "method") == method && results.Text(row, "stratum") == stratum);

    private static double Number(ResultsTable results, int row, string column) => double.Parse(results.Text(row, column), CultureInfo.InvariantCulture);
}
