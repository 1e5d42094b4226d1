namespace MatchedSuite.Storage.Tests;

public class NearestNameTests
{
    [Theory]
    [InlineData("smaple_id", "sample_id")]
    [InlineData("SAMPLE_ID", "sample_id")]
    [InlineData("sampleid", "sample_id")]
    [InlineData("twinpair", "twin_pair")]
    [InlineData(" role ", "role")]
    [InlineData("rolle", "role")]
    public void A_misspelt_name_finds_the_one_that_was_meant(string wanted, string meant) =>
        Assert.Equal(meant, NearestName.Of(wanted, ["role", "sample_id", "twin_pair", "period"]));

    [Theory]
    [InlineData("covariates")]
    [InlineData("x")]
    [InlineData("")]
    public void A_name_unlike_all_others_gets_no_suggestion(string wanted) =>
        Assert.Null(NearestName.Of(wanted, ["role", "sample_id", "twin_pair"]));

    [Fact]
    public void The_nearer_of_two_is_taken_and_of_equals_the_first()
    {
        Assert.Equal("ferritin", NearestName.Of("feritin", ["fetuin", "ferritin"]));
        Assert.Equal("il-6", NearestName.Of("il-7", ["il-6", "il-8"]));
    }

    [Fact]
    public void A_swap_of_neighbours_is_one_step() =>
        Assert.Equal("crp", NearestName.Of("cpr", ["tnf", "crp", "il6"]));
}
