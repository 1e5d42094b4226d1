using System.Globalization;
using MatchedSuite.EndToEnd.Tests.Program;

namespace MatchedSuite.EndToEnd.Tests;

/// <summary>What a study of pairs may ask for beside the plain comparison, through the executable.</summary>
public class PairStudyTests
{
    // Eight pairs with a covariate, a stratum, an exposure in hours and months of follow-up.
    private const string Sheet =
        """
        sample,pair,exposed,bmi,smoking,zygosity,hours,months
        s1a,p1,yes,24.1,no,MZ,12,10
        s1b,p1,no,23.0,no,MZ,2,20
        s2a,p2,yes,27.3,yes,MZ,20,10
        s2b,p2,no,26.1,no,MZ,4,20
        s3a,p3,yes,22.2,no,MZ,9,10
        s3b,p3,no,22.9,no,MZ,1,20
        s4a,p4,yes,30.4,no,MZ,14,10
        s4b,p4,no,28.8,yes,MZ,0,20
        s5a,p5,yes,25.0,no,DZ,7,10
        s5b,p5,no,24.2,no,DZ,3,20
        s6a,p6,yes,26.6,yes,DZ,16,10
        s6b,p6,no,27.5,no,DZ,5,20
        s7a,p7,yes,23.8,no,DZ,11,10
        s7b,p7,no,21.9,no,DZ,6,20
        s8a,p8,yes,28.1,no,DZ,18,10
        s8b,p8,no,25.6,no,DZ,8,20
        """;

    [Fact]
    public void Covariates_adjust_the_mean_difference()
    {
        using StudyFolder folder = Study("  covariates: [bmi]\n");
        ResultsTable results = Analyse(folder);

        // Base R 4.2.2: lm(d ~ bmi difference) on the differences of crp: intercept and its t.
        Assert.Equal(Expected("crp", 0), results.Number("crp", "paired-t", "estimate"), 1e-12);
        Assert.Equal(Expected("crp", 1), results.Number("crp", "paired-t", "statistic"), 1e-10);
        Assert.Equal("6", results.Text("crp", "paired-t", "df"));
        Assert.Contains("unadjusted", results.Text("crp", "signed-rank", "flags"), StringComparison.Ordinal);
    }

    [Fact]
    public void A_covariate_that_never_varies_within_sets_is_named()
    {
        using StudyFolder folder = Study("  covariates: [bmi, zygosity]\n");
        Finished run = folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        Assert.Contains("covariate 'zygosity=MZ' is the same within every set", run.Error, StringComparison.Ordinal);
        Assert.Equal(Expected("crp", 0), folder.Results().Number("crp", "paired-t", "estimate"), 1e-12);
    }

    [Fact]
    public void Strata_give_a_row_each_and_Welchs_test_between_them()
    {
        using StudyFolder folder = Study("  stratum: zygosity\n");
        ResultsTable results = Analyse(folder);
        string[] strata = [.. Enumerable.Range(0, results.Rows)
            .Where(row => results.Text(row, "endpoint") == "crp" && results.Text(row, "method") == "paired-t").Select(row => results.Text(row, "stratum"))];
        Assert.Equal(["", "DZ", "MZ", "difference"], strata);
        int between = Enumerable.Range(0, results.Rows)
            .Single(row => results.Text(row, "endpoint") == "crp" && results.Text(row, "method") == "paired-t" && results.Text(row, "stratum") == "difference");

        // Base R 4.2.2: t.test of the four DZ differences against the four MZ differences, unequal variances.
        Assert.Equal(Expected("crp", 2), double.Parse(results.Text(between, "statistic"), CultureInfo.InvariantCulture), 1e-10);
        Assert.Equal(Expected("crp", 3), double.Parse(results.Text(between, "p_value"), CultureInfo.InvariantCulture), 1e-10);
        Assert.StartsWith("endpoint,icc_mz,", folder.Read("results/twins.csv"), StringComparison.Ordinal);
    }

    [Fact]
    public void A_measured_exposure_gives_the_slope_per_unit()
    {
        using StudyFolder folder = Study("");
        folder.Change("study.yaml", "  role: {column: exposed, index: \"yes\", reference: \"no\"}", "  exposure: {column: hours}");
        folder.Change("study.yaml", "[paired-t, signed-rank]", "[within-pair-slope]");
        ResultsTable results = Analyse(folder);
        Assert.Equal("per-unit", results.Text("crp", "within-pair-slope", "contrast"));

        // Base R 4.2.2: lm(d ~ 0 + hours difference).
        Assert.Equal(Expected("crp", 4), results.Number("crp", "within-pair-slope", "estimate"), 1e-12);
        Assert.Equal(Expected("crp", 5), results.Number("crp", "within-pair-slope", "statistic"), 1e-10);
    }

    [Fact]
    public void Values_below_their_limit_are_replaced_and_counted_and_compared_as_above_and_below()
    {
        using StudyFolder folder = Study("");
        folder.Write("markers.csv", "endpoint,detection_limit\ncrp,2.95\ntnf,1.15\n");
        folder.Change("study.yaml", "analysis:", "endpoints: {dictionary: markers.csv, below-limit: limit}\nanalysis:");
        ResultsTable results = Analyse(folder);

        // Of crp, 8 reference and 4 index values of 16 lie below 2.95: more than half.
        Assert.Contains("mostly-below-limit", results.Text("crp", "paired-t", "flags"), StringComparison.Ordinal);
        Assert.DoesNotContain("mostly-below-limit", results.Text("tnf", "paired-t", "flags"), StringComparison.Ordinal);
        Assert.Equal("4", results.Text("crp", "mcnemar-exact", "statistic"));
        Assert.Equal(0.125, results.Number("crp", "mcnemar-exact", "p_value"), 1e-12); // 2 * 0.5^4
    }

    [Fact]
    public void Estimates_per_standard_deviation_have_no_unit()
    {
        using StudyFolder folder = Study("");
        ResultsTable plain = Analyse(folder);
        folder.Change("study.yaml", "analysis:", "endpoints: {scale: sd}\nanalysis:");
        ResultsTable scaled = Analyse(folder);

        // Reference values of alb: 41, 42, 40, 41, 41, 42, 39, 40; their standard deviation by hand is sqrt(1.071428...).
        Assert.Equal(plain.Number("alb", "paired-t", "estimate") / Math.Sqrt(7.5 / 7), scaled.Number("alb", "paired-t", "estimate"), 1e-12);
        Assert.Equal(plain.Text("alb", "paired-t", "p_value"), scaled.Text("alb", "paired-t", "p_value"));
    }

    [Fact]
    public void The_standardised_mean_difference_has_limits_when_asked_for()
    {
        using StudyFolder folder = Study("");
        folder.Change("study.yaml", "analysis: {", "analysis: {intervals: [effect-size], ");
        Analyse(folder);
        DetailsTable details = DetailsTable.Read(folder.At("results/details.parquet"));

        // Base R 4.2.2: its noncentral t is good to about seven digits here.
        Assert.Equal(Expected("crp", 6), details["crp", "paired-t", "effect-size-low"], 1e-6);
        Assert.Equal(Expected("crp", 7), details["crp", "paired-t", "effect-size-high"], 1e-6);
    }

    [Fact]
    public void Counts_of_replicates_are_never_averaged()
    {
        using StudyFolder folder = Study("  replicates: mean\n");
        folder.Write("samples.csv", folder.Read("samples.csv") + "s9,p1,yes,24.1,no,MZ,12,10\n");
        string[] lines = folder.Read("panel.csv").Trim().Split('\n');
        folder.Write("panel.csv", lines[0] + ",s9\nspells," + string.Join(',', Enumerable.Repeat("3,2", 8)) + ",4\n");
        folder.Change("study.yaml", "continuous: [paired-t, signed-rank]", "count: [paired-poisson]");
        folder.Change("study.yaml", "analysis:", "endpoints: {kind: count}\nanalysis:");
        Finished run = folder.Run("analyze", "study.yaml");
        Assert.Equal(2, run.ExitCode);
        Assert.Contains("design.replicates", run.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void Counts_are_compared_per_time_at_risk()
    {
        using StudyFolder folder = Study("  person-time: months\n");
        folder.Write("panel.csv", folder.Read("panel.csv").Split('\n')[0] + "\nspells," + string.Join(',', Enumerable.Repeat("3,2", 8)) + "\n");
        folder.Change("study.yaml", "continuous: [paired-t, signed-rank]", "count: [paired-poisson]");
        folder.Change("study.yaml", "analysis:", "endpoints: {kind: count}\nanalysis:");
        ResultsTable results = Analyse(folder);
        Assert.Equal(24.0 / 80 / (16.0 / 160), results.Number("spells", "paired-poisson", "ratio"), 1e-12);
    }

    [Fact]
    public void Rank_normal_scores_and_sign_flips_run_from_the_study_file()
    {
        using StudyFolder folder = Study("");
        folder.Change("study.yaml", "[paired-t, signed-rank]", "[sign-flip, trimmed-mean, signed-rank]");
        folder.Change("study.yaml", "analysis: {", "endpoints: {transform: rank-normal}\nanalysis: {zeros: pratt, sides: greater, ");
        ResultsTable results = Analyse(folder);

        // Eight pairs: p is a multiple of 2^-8 by full enumeration.
        double multiple = results.Number("crp", "sign-flip", "p_value") * 256;
        Assert.Equal(Math.Round(multiple), multiple, 1e-9);
        Assert.Equal("Infinity", results.Text("crp", "trimmed-mean", "ci_high"));
        Assert.Equal("", results.Text("crp", "sign-flip", "ratio"));
    }

    // Values by base R 4.2.2 (Inputs/pairs/adjusted.R writes them).
    private static double Expected(string endpoint, int column)
    {
        string path = Path.Combine(AppContext.BaseDirectory, "Inputs", "pairs", "adjusted-expected.csv");
        string[] row = File.ReadLines(path).Select(line => line.Split(',')).Single(cells => cells[0] == endpoint);
        return double.Parse(row[column + 1], CultureInfo.InvariantCulture);
    }

    private static StudyFolder Study(string design)
    {
        StudyFolder folder = StudyFolder.Small();
        folder.Write("samples.csv", Sheet + "\n");
        folder.Change("study.yaml", "  set: pair\n", $"  set: pair\n{design}");
        return folder;
    }

    private static ResultsTable Analyse(StudyFolder folder)
    {
        Finished run = folder.Run("analyze", "study.yaml");
        Assert.True(run.ExitCode == 0, run.Error);
        return folder.Results();
    }
}
