using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Engine.Tests.Evaluation;
using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Tests.Adjusting;

/// <summary>What is kept of an endpoint where labels are exchanged between arms.</summary>
public class RelabelPlanTests
{
    private const string Arms = "kind: change-by-arm\nstratum: town\nvisit: {column: visit, order: [v0, v1, v2]}\narm: {column: arm, index: new, reference: old}";

    [Fact]
    public void Every_contrast_between_arms_keeps_the_changes_of_all_its_subjects_and_of_each_stratum()
    {
        using var study = new SubjectStudy(Arms, "{continuous: [change-ancova], adjust: [max-t]}");
        FlipPlan flips = study.Plan.Flips!;
        Assert.Equal([0, 0, 0, 2, 2, 2], flips.Sections.Select(section => (int)section.Contrast));
        Assert.Equal(36, flips.Sections[0].Sets);
        Assert.Equal(29, flips.Sections[3].Sets); // seven of 36 miss the last visit
        Assert.Equal(flips.Width, flips.Sections[^1].Offset + flips.Sections[^1].Sets);
        Assert.All(flips.Sections, section => Assert.Equal((1, section.Sets), (section.Blocks!.Count, section.Blocks.Members)));
        Assert.Equal(12, flips.Sections[0].Blocks!.IndexCounts[0]);

        BlockOutput output = study.Evaluated(EndpointKind.Continuous);
        Arrangement arrangement = study.Plan.Arrangement;
        double[] values = study.Values(EndpointKind.Continuous);
        var before = new double[36];
        var after = new double[36];
        arrangement.Places[0].Gather(values, before);
        arrangement.Places[2].Gather(values, after);
        double[] changes = [.. after.Zip(before, (last, first) => last - first).Where(double.IsFinite)];
        Assert.Equal(changes, output.Differences.Row.Slice(flips.Sections[3].Offset, 29).ToArray());
        Assert.Equal(ResultRow.AllStrata, flips.Sections[3].Stratum);
    }

    [Fact]
    public void Nothing_is_kept_where_no_adjustment_exchanges_labels()
    {
        using var study = new SubjectStudy(Arms, "{continuous: [change-ancova], adjust: [holm]}");
        Assert.Null(study.Plan.Flips);
        Assert.True(study.Evaluated(EndpointKind.Continuous).Differences.Row.IsEmpty);
    }

    [Fact]
    public void Min_p_is_refused_by_name_of_what_does() =>
        Assert.Contains("max-t", Assert.Throws<RefusalException>(() => new SubjectStudy(Arms, "{continuous: [change-welch], adjust: [min-p]}")).Message, StringComparison.Ordinal);
}
