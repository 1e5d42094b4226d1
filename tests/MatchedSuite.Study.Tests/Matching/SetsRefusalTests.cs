namespace MatchedSuite.Study.Tests.Matching;

/// <summary>What a sheet of matched sets cannot be: refused with the lines it is about.</summary>
public class SetsRefusalTests
{
    [Theory]
    [InlineData("", "a,P,yes,x\nb,Q,no,y\n", "no set has a sample in both roles", "2 no-partner")]
    [InlineData("", "a,P,yes,x\nb,P,no,x\n", "lines 2 and 3|line 2|line 3", "'x' has both roles of the set 'P'")]
    [InlineData("", "a,P,yes,x\nb,P,no,y\nc,P,no,y\n", "line 3", "the set 'P' has 2 samples of 'y'", "mean or first")]
    [InlineData("", "a,P,yes,x\nb,P,no,y\na,Q,yes,z\n", "line 4", "the sample 'a' is already on", "every sample once")]
    [InlineData("\nreuse: allowed", "a,P,yes,x\nb,P,no,y\nb,P,no,z\n", "line 4", "the sample 'b' is already on", "every sample once in a set")]
    public void One_message_names_what_was_found(string design, string rows, params string[] pieces)
    {
        string message = Audits.Refusal(Audits.Sets("subject: person" + design), "id,pair,smoker,person\n" + rows).Message;
        Assert.All(pieces, piece => Assert.Contains(piece.Split('|'), part => message.Contains(part, StringComparison.Ordinal)));
    }

    [Fact]
    public void Sets_that_are_all_outside_the_tolerance_leave_nothing()
    {
        string message = Audits.Refusal(
            Audits.Sets("match-on: [{column: age, within: 1}]", "tolerance: drop"), "id,pair,smoker,age\na,P,yes,40\nb,P,no,50\nc,P,no,60\n").Message;
        Assert.Contains("every complete set is outside the tolerance", message, StringComparison.Ordinal);
    }
}
