using MatchedSuite.Engine.Rows;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Tests.Evaluation;

/// <summary>One endpoint on visits, arms and periods: which rows come out, in which order, and at no cost of memory.</summary>
public class SubjectEvaluatorsTests
{
    private const string Visits = "kind: visits\nvisit: {column: visit, order: [v0, v1, v2]}\ncontrasts: [successive, trend, omnibus]";
    private const string Arms = "kind: change-by-arm\nvisit: {column: visit, order: [v0, v1, v2]}\narm: {column: arm, index: new, reference: old}";
    private const string Crossover = "kind: crossover\nperiod: {column: visit, order: [v0, v1]}\ntreatment: {column: drug, index: A, reference: B}";
    private const string AllOfVisits = "{continuous: [paired-t, mixed-model, rm-anova, friedman, linear-trend, page-trend], binary: [mcnemar-exact, cochran-q], ordinal: [sign, friedman, page-trend], count: [paired-poisson, friedman, page-trend]}";
    private const string AllOfArms = "{continuous: [paired-t, change-welch, change-ancova, signed-rank], ordinal: [change-rank-sum]}";

    [Fact]
    public void Visits_give_rows_comparison_by_comparison_and_the_first_method_that_makes_one_is_primary()
    {
        using var study = new SubjectStudy(Visits, AllOfVisits);
        string[] expected =
        [
            "v1-v0 paired-t *", "v1-v0 mixed-model ", "v2-v1 paired-t *", "v2-v1 mixed-model ",
            "trend mixed-model *", "trend linear-trend ", "trend page-trend ", "omnibus mixed-model *", "omnibus rm-anova ", "omnibus friedman ",
        ];
        Assert.Equal(expected, study.Rows(EndpointKind.Continuous));
        Assert.Equal(["v1-v0 mcnemar-exact *", "v2-v1 mcnemar-exact *", "omnibus cochran-q *"], study.Rows(EndpointKind.Binary));
    }

    [Fact]
    public void Strata_follow_and_only_estimates_are_compared_between_them()
    {
        using var study = new SubjectStudy(Visits + "\nstratum: town", "{continuous: [mixed-model, friedman]}");
        string[] rows = study.Rows(EndpointKind.Continuous);
        Assert.Equal(["v1-v0 mixed-model *", "v1-v0 mixed-model east*", "v1-v0 mixed-model west*", "v1-v0 mixed-model difference*"], rows[..4]);
        Assert.Equal(
            ["omnibus mixed-model *", "omnibus mixed-model east*", "omnibus mixed-model west*", "omnibus friedman ", "omnibus friedman east", "omnibus friedman west"],
            rows[^6..]);
    }

    [Fact]
    public void A_comparison_counts_as_missing_only_subjects_who_were_seen()
    {
        using var study = new SubjectStudy(Visits, AllOfVisits);
        ResultRow[] rows = study.Evaluated(EndpointKind.Continuous).Rows.Records.ToArray();

        // Of 36 subjects 7 were not seen at the last visit.
        Assert.Equal((36, 0), (rows[0].Sets, rows[0].Missing));
        Assert.Equal((29, 0), (rows[2].Sets, rows[2].Missing));
        Assert.Equal((36, 36 + 36 + 29), (rows[4].Sets, rows[4].Samples));
        Assert.Equal((29, 87), (rows[^1].Sets, rows[^1].Samples));
    }

    [Fact]
    public void Arms_are_compared_at_every_follow_up_and_described_one_by_one()
    {
        using var study = new SubjectStudy(Arms, AllOfArms);
        string[] expected =
        [
            "v1-v0:new-old change-welch *", "v1-v0:new-old change-ancova ", "v1-v0 paired-t new", "v1-v0 paired-t old", "v1-v0 signed-rank new", "v1-v0 signed-rank old",
            "v2-v0:new-old change-welch *", "v2-v0:new-old change-ancova ", "v2-v0 paired-t new", "v2-v0 paired-t old", "v2-v0 signed-rank new", "v2-v0 signed-rank old",
        ];
        Assert.Equal(expected, study.Rows(EndpointKind.Continuous));
        Assert.Equal("v1-v0 signed-rank new", study.Rows(EndpointKind.Ordinal)[1]);
    }

    [Fact]
    public void Arms_keep_their_names_beside_strata()
    {
        using var study = new SubjectStudy(Arms + "\nstratum: town", "{continuous: [change-welch]}");
        Assert.Equal(
            ["v1-v0:new-old change-welch *", "v1-v0:new-old change-welch east*", "v1-v0:new-old change-welch west*", "v1-v0:new-old change-welch difference*", "v1-v0 paired-t new", "v1-v0 paired-t old"],
            study.Rows(EndpointKind.Continuous)[..6]);
    }

    [Fact]
    public void Crossovers_have_one_comparison()
    {
        using var study = new SubjectStudy(Crossover + "\nstratum: town", "{}");
        Assert.Equal(
            ["A-B crossover-t *", "A-B crossover-t east*", "A-B crossover-t west*", "A-B crossover-t difference*"],
            study.Rows(EndpointKind.Continuous));
        Assert.Equal("A-B mainland-gart *", study.Rows(EndpointKind.Binary)[0]);
    }

    [Theory]
    [InlineData(Visits, AllOfVisits, EndpointKind.Continuous)]
    [InlineData(Visits + "\ncovariates: [cold]", AllOfVisits, EndpointKind.Continuous)]
    [InlineData(Visits + "\nstratum: town", AllOfVisits, EndpointKind.Continuous)]
    [InlineData(Visits, AllOfVisits, EndpointKind.Binary)]
    [InlineData(Visits + "\nstratum: town", AllOfVisits, EndpointKind.Ordinal)]
    [InlineData(Arms + "\nstratum: town", AllOfArms, EndpointKind.Continuous)]
    [InlineData(Arms, AllOfArms, EndpointKind.Ordinal)]
    [InlineData(Crossover, "{}", EndpointKind.Continuous)]
    [InlineData(Crossover, "{}", EndpointKind.Binary)]
    public void Nothing_is_allocated_for_a_further_endpoint(string design, string analysis, EndpointKind kind)
    {
        using var study = new SubjectStudy(design, analysis, "{scale: sd}");
        Assert.Equal(0, study.BytesOfAFurtherEndpoint(new EndpointInfo { Name = "a", Kind = kind, Transform = kind == EndpointKind.Continuous ? Transform.Log2 : Transform.None }));
    }

    [Theory]
    [InlineData("kind: visits\nvisit: {column: visit, order: [v0, v1, v2]}\ncontrasts: [omnibus]", "{continuous: [paired-t]}", "'rm-anova', 'rm-anova-hf', 'rm-anova-raw', 'friedman', 'mixed-model'")]
    [InlineData("kind: visits\nvisit: {column: visit, order: [v0, v1, v2]}", "{continuous: [rm-anova]}", "'paired-t', ")]
    [InlineData(Arms, "{continuous: [paired-t]}", "'change-ancova', 'change-welch', 'change-rank-sum'")]
    public void A_comparison_that_no_named_method_makes_is_refused_with_those_that_would(string design, string analysis, string named)
    {
        string message = Assert.Throws<Storage.RefusalException>(() => new SubjectStudy(design, analysis)).Message;
        Assert.Contains(named, message, StringComparison.Ordinal);
        Assert.Contains("study.yaml, analysis.continuous", message, StringComparison.Ordinal);
    }

    [Fact]
    public void Kinds_that_name_no_method_get_the_usual_one_of_every_comparison()
    {
        using var study = new SubjectStudy(Visits, "{}");
        Assert.Equal(
            ["v1-v0 paired-t *", "v1-v0 signed-rank ", "v2-v1 paired-t *", "v2-v1 signed-rank ", "trend linear-trend *", "omnibus rm-anova *"],
            study.Rows(EndpointKind.Continuous));
        Assert.Equal(["v1-v0 paired-poisson *", "v2-v1 paired-poisson *", "trend page-trend *", "omnibus friedman *"], study.Rows(EndpointKind.Count));
    }
}
