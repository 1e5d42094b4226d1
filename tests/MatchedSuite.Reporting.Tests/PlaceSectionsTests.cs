using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Reporting.Tests;

/// <summary>What the page on the matching says of subjects with visits.</summary>
public class PlaceSectionsTests
{
    private static readonly StudyDefinition Study = new()
    {
        Path = "/study/study.yaml",
        Text = "",
        Name = "Arms",
        Data = new DataSection { Samples = "/study/samples.csv" },
        Design = new DesignSection { Kind = DesignKind.ChangeByArm },
        Output = new OutputSection { Folder = "/study/out" },
    };

    private static readonly MatchingAudit Audit = new()
    {
        Dispositions = [Disposition.Used, Disposition.Used, Disposition.Used, Disposition.Used],
        AuditTable = [],
        Counts = [.. Enum.GetValues<Disposition>().Select(kind => new DispositionCount(kind, kind == Disposition.Used ? 4 : 0))],
        Arrangement = new Arrangement { Rows = [0, 1, 2, 3], Sets = ["P1", "P2"], Places = [], GroupOfSet = [0, 1] },
        Shapes = [],
        Balance = [],
        Breaches = [],
        Patterns = new PlacePatterns(["before", "after"], ["new", "old"], [new PlacePattern([true, true], [1, 1]), new PlacePattern([true, false], [0, 3])]),
        OutOfOrder = [new OrderBreach("P1", "before", 3, "after", 2.5)],
        GroupBalance = [new GroupBalance("age", new GroupMoments(1, 40, double.NaN), new GroupMoments(1, 43, double.NaN), double.NaN)],
        BrokenGates = [],
        Warnings = [],
        RowsOfInterest = 7,
        RowsUnmatched = 3,
    };

    private static readonly string[] Page = MatchingPage.Text(Study, Audit).Split('\n');

    [Fact]
    public void Patterns_are_counted_by_group_and_add_up()
    {
        Assert.Contains("| before | after | new | old |", Page);
        Assert.Contains("| yes | yes | 1 | 1 |", Page);
        Assert.Contains("| yes | – | 0 | 3 |", Page);
        Assert.Contains("5 subjects have a sample that can be used; 2 subjects are used.", Page);
    }

    [Fact]
    public void Groups_are_compared_before_treatment()
    {
        Assert.Contains("| new | 1 |", Page);
        Assert.Contains("| age | 1 | 40.00 (–) | 1 | 43.00 (–) | – |", Page);
    }

    [Fact]
    public void Visits_out_of_order_are_named_with_their_days() =>
        Assert.Contains("| P1 | before | 3 | after | 2.5 |", Page);

    [Fact]
    public void What_belongs_to_roles_is_left_out()
    {
        Assert.DoesNotContain(Page, line => line.Contains("Sets by shape", StringComparison.Ordinal));
        Assert.DoesNotContain(Page, line => line.Contains("outside match-on", StringComparison.Ordinal));
    }
}
