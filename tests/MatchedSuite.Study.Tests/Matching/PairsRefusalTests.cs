namespace MatchedSuite.Study.Tests.Matching;

/// <summary>A sheet that contradicts the study file or itself is refused: where, what was found, what was expected, what to do.</summary>
public class PairsRefusalTests
{
    private const string Right = "id,pair,smoker\na,P,yes\nb,P,no\nc,Q,yes\nd,Q,no\n";

    [Fact]
    public void A_sample_that_stands_twice_is_refused_with_both_lines()
    {
        string message = Audits.Refusal(Audits.Pairs(), Right.Replace("c,Q", "a,Q", StringComparison.Ordinal)).Message;
        Assert.Contains("samples.csv, line 4, column 'id'", message, StringComparison.Ordinal);
        Assert.Contains("'a' is already on samples.csv, line 2", message, StringComparison.Ordinal);
    }

    [Fact]
    public void Measured_samples_that_the_sheet_does_not_have_are_named_up_to_five()
    {
        string message = Audits.Refusal(Audits.Pairs(data: ", values: panel.csv"), Right, "a", "b", "t", "u", "v", "w", "x", "y").Message;
        Assert.Contains("panel.csv: 6 of 8 samples are not in samples.csv: 't', 'u', 'v', 'w', 'x' and 1 more", message, StringComparison.Ordinal);
    }

    [Fact]
    public void Measurements_of_other_samples_altogether_are_refused_with_examples_of_both()
    {
        string message = Audits.Refusal(Audits.Pairs(data: ", values: panel.csv"), Right, "S1", "S2").Message;
        Assert.Contains("no sample of the measurements ('S1', 'S2') is in the column 'id' ('a', 'b', 'c', 'd')", message, StringComparison.Ordinal);
        Assert.Contains("data.layout", message, StringComparison.Ordinal);
    }

    [Fact]
    public void No_complete_pair_is_refused_with_the_flow()
    {
        string message = Audits.Refusal(Audits.Pairs(), "id,pair,smoker\na,P,yes\nb,Q,no\nc,,no\n").Message;
        Assert.Contains("no set has a sample in both roles (rows: 1 set-missing, 2 no-partner)", message, StringComparison.Ordinal);
        Assert.Contains("design.set", message, StringComparison.Ordinal);
    }

    [Fact]
    public void Pairs_that_are_all_outside_the_tolerance_are_refused()
    {
        string study = Audits.Pairs("match-on: [{column: age, within: 1}]", "tolerance: drop");
        string message = Audits.Refusal(study, "id,pair,smoker,age\na,P,yes,1\nb,P,no,9\n").Message;
        Assert.Contains("2 outside-tolerance", message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_set_with_three_members_is_refused_with_its_name_and_lines()
    {
        string message = Audits.Refusal(Audits.Pairs(), Right + "e,P,yes\n").Message;
        Assert.Contains("samples.csv, line 2 and samples.csv, line 6", message, StringComparison.Ordinal);
        Assert.Contains("the set 'P' has 3 members, 2 of them in the role 'yes'", message, StringComparison.Ordinal);
        Assert.Contains("design.replicates", message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("mean")]
    [InlineData("first")]
    public void Two_people_in_one_role_are_no_replicates(string replicates)
    {
        string study = Audits.Pairs($"subject: person\nreplicates: {replicates}");
        string message = Audits.Refusal(study, "id,pair,smoker,person\na,P,yes,1\nb,P,no,2\nc,P,yes,3\n").Message;
        Assert.Contains("the set 'P' has 2 people in the role 'yes': '1', '3'", message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_role_that_never_occurs_is_refused_with_those_that_do()
    {
        string message = Audits.Refusal(Audits.Pairs(), Right.Replace("yes", "Yes", StringComparison.Ordinal)).Message;
        Assert.Contains("samples.csv, column 'smoker': the value 'yes', which the study file names under 'design.role.index', occurs in no row", message, StringComparison.Ordinal);
        Assert.Contains("one of the values that occur: 'Yes', 'no'", message, StringComparison.Ordinal);
        Assert.Contains("Did you mean 'Yes'?", message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("id,pairs,smoker", "pair", "design.set", "pairs")]
    [InlineData("id,pair,smokers", "smoker", "design.role.column", "smokers")]
    [InlineData("ids,pair,smoker", "id", "data.sample", "ids")]
    public void A_column_that_is_absent_is_refused_with_its_key_and_the_nearest(string header, string column, string key, string nearest)
    {
        string message = Audits.Refusal(Audits.Pairs(), Right.Replace("id,pair,smoker", header, StringComparison.Ordinal)).Message;
        Assert.Contains($"there is no column '{column}', which the study file names under '{key}'", message, StringComparison.Ordinal);
        Assert.Contains($"Did you mean '{nearest}'?", message, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("subject: x", "design.subject")]
    [InlineData("stratum: x", "design.stratum")]
    [InlineData("covariates: [x]", "design.covariates")]
    [InlineData("person-time: x", "design.person-time")]
    [InlineData("match-on: [{column: x, equal: true}]", "design.match-on")]
    public void Every_column_the_design_names_must_be_there(string design, string key)
    {
        Assert.Contains($"'{key}'", Audits.Refusal(Audits.Pairs(design), Right).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_match_variable_with_within_must_be_numeric()
    {
        string study = Audits.Pairs("match-on: [{column: age, within: 1}]");
        string message = Audits.Refusal(study, "id,pair,smoker,age\na,P,yes,40\nb,P,no,forty\n").Message;
        Assert.Contains("samples.csv, line 3, column 'age': 'forty' is not a number", message, StringComparison.Ordinal);
        Assert.Contains("equal: true", message, StringComparison.Ordinal);
    }
}
