using MatchedSuite.Engine.Adjusting;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Engine.Tests.Adjusting;

public class RowAdjusterTests
{
    [Fact]
    public void Each_family_is_adjusted_as_if_there_were_no_other()
    {
        using var study = new PlannedStudy("adjust: [bonferroni], family: by-family");
        AdjustedColumns columns = study.Add("a", 0, 1, 0.01).Add("b", 1, 1, 0.02).Add("a", 2, 1, 0.03).Add("a", 3, 1, double.NaN).Adjust();
        Assert.Equal([0.02, 0.02, 0.06], Enumerable.Range(0, 3).Select(row => columns.Of(0, row).Value));
        Assert.True(columns.Of(0, 3).IsMissing);
        Assert.Equal([("a", 2), ("b", 1)], columns.Groups.Select(group => (group.Family!, group.Hypotheses)));
    }

    [Fact]
    public void Families_are_selected_first_for_bh_and_all_are_adjusted_together_for_family_wise_procedures()
    {
        using var study = new PlannedStudy("adjust: [bh, bonferroni], family: by-family-then-all");
        AdjustedColumns columns = study.Add("a", 0, 1, 0.001).Add("a", 1, 1, 0.04).Add("b", 2, 1, 0.5).Add("b", 3, 1, 0.9).Add("c", 4, 1, 0.2).Adjust();
        Probability[] p = [.. new[] { 0.001, 0.04, 0.5, 0.9, 0.2 }.Select(Probability.Of)];
        var expected = new Probability[5];
        FamilySelection.Adjust(p, new Families([0, 0, 1, 1, 2]), expected);
        Assert.Equal(expected, Enumerable.Range(0, 5).Select(row => columns.Of(0, row)));
        Assert.Equal([0.005, 0.2, 1, 1, 1], Enumerable.Range(0, 5).Select(row => columns.Of(1, row).Value));
        Assert.Single(columns.Groups);
    }

    [Fact]
    public void Hypotheses_of_all_contrasts_are_adjusted_together_when_asked()
    {
        using var apart = new PlannedStudy("adjust: [bonferroni]");
        using var together = new PlannedStudy("adjust: [bonferroni]", acrossContrasts: true);
        foreach (PlannedStudy study in (PlannedStudy[])[apart, together])
            study.Add("a", 0, 1, 0.01, 0.02).Add("a", 1, 1, 0.03, 0.04);
        Assert.Equal([0.02, 0.04, 0.06, 0.08], Enumerable.Range(0, 4).Select(row => apart.Adjust().Of(0, row).Value));
        Assert.Equal([0.04, 0.08, 0.12, 0.16], Enumerable.Range(0, 4).Select(row => together.Adjust().Of(0, row).Value));
        Assert.Equal("all", together.Plan.ContrastName(together.Adjust().Groups[0].Contrast));
    }

    [Fact]
    public void Ordered_procedures_follow_the_dictionary_and_then_the_data()
    {
        using var study = new PlannedStudy("adjust: [fixed-sequence, gatekeeper-holm]");
        AdjustedColumns columns = study.Add("x", int.MaxValue, 1, 0.5).Add("y", 1, 1, 0.02).Add("x", 0, 1, 0.01).Add("x", int.MaxValue, 1, 0.001).Adjust();

        // In order of testing 0.01, 0.02, 0.5, 0.001; family x is met first, so y waits for its three.
        Assert.Equal([0.5, 0.02, 0.01, 0.5], Enumerable.Range(0, 4).Select(row => columns.Of(0, row).Value));
        Assert.Equal([0.5, 0.5, 0.02, 0.003], Enumerable.Range(0, 4).Select(row => columns.Of(1, row).Value));
    }

    [Fact]
    public void Weights_are_used_where_they_differ()
    {
        using var study = new PlannedStudy("adjust: [holm, weighted-bh]");
        AdjustedColumns columns = study.Add("a", 0, 3, 0.03).Add("a", 1, 1, 0.02).Adjust();
        Assert.Equal(0.04, columns.Of(0, 0).Value, 1e-15);
        Assert.Equal(0.04, columns.Of(0, 1).Value, 1e-15);
        Assert.Equal(0.04, columns.Of(1, 0).Value, 1e-15);
        Assert.Equal(0.04, columns.Of(1, 1).Value, 1e-15);
    }

    [Theory]
    [InlineData("bonferroni", 3, false)]
    [InlineData("bonferroni", 4, true)]
    [InlineData("sidak", 3, false)]
    [InlineData("sidak", 4, true)]
    [InlineData("fixed-sequence", 40, false)]
    [InlineData("bh", 40, false)]
    public void An_endpoint_is_out_of_reach_when_its_smallest_p_is_above_the_first_step(string adjustment, int endpoints, bool outOfReach)
    {
        // The smallest possible p is 1/64 = 0.0156: below 0.05/3 and 1 − 0.95^(1/3), above 0.05/4 and 1 − 0.95^(1/4).
        using var study = new PlannedStudy($"adjust: [{adjustment}]");
        for (int endpoint = 0; endpoint < endpoints; endpoint++)
            study.Add("a", endpoint, 1, 0.5);
        Assert.Equal(outOfReach ? Remarks.OutOfReach : Remarks.None, study.Adjust().RemarksOf(0));
    }
}
