using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Reporting.Tests;

/// <summary>The page on the matching: its numbers add up and it names what was found.</summary>
public class MatchingPageTests
{
    private static readonly StudyDefinition Study = new()
    {
        Path = "/study/study.yaml",
        Text = "",
        Name = "Harbour twins",
        Data = new DataSection { Samples = "/study/samples.csv" },
        Design = new DesignSection { Kind = DesignKind.Pairs },
        Gates = new GateSection { UnmatchedAtMost = 0.435, Tolerance = Tolerance.Refuse, MissingAtMost = 0.5 },
        Output = new OutputSection { Folder = "/study/out" },
    };

    private static readonly MatchingAudit Audit = new()
    {
        Dispositions = [Disposition.Used, Disposition.Used, Disposition.SetMissing, Disposition.NoPartner, Disposition.NoPartner, Disposition.Used, Disposition.Used],
        AuditTable = [],
        Counts = [.. Enum.GetValues<Disposition>().Select(kind => new DispositionCount(kind, kind switch { Disposition.Used => 4, Disposition.SetMissing => 1, Disposition.NoPartner => 2, _ => 0 }))],
        Arrangement = new Arrangement { Rows = [0, 1, 5, 6], Sets = ["P|1", "P2"], Places = [], Strata = ["DZ", "MZ"], StratumOfSet = [1, 1] },
        Shapes = [new SetShape(1, 0, 2), new SetShape(1, 1, 2)],
        Balance =
        [
            new MatchBalance("age", "within 2", 1, 1, 0, new NumberBalance(40, double.NaN, 43, double.NaN, -3, 3, double.NaN)),
            new MatchBalance("sex", "equal", 2, 0, 2, null),
        ],
        Breaches = [new ToleranceBreach("P|1", "age", "40", "43", "within 2")],
        BrokenGates = [new BrokenGate("tolerance", "1 set outside match-on", "no set outside match-on")],
        Warnings = [new AuditWarning("match-unknown", "1 used set lacks a value that match-on would check.")],
        RowsOfInterest = 7,
        RowsUnmatched = 3,
    };

    private static readonly string[] Page = MatchingPage.Text(Study, Audit).Split('\n');

    [Theory]
    [InlineData("# Matching of Harbour twins")]
    [InlineData("| read | 7 | 7 |")]
    [InlineData("| set-missing | −1 | 6 |")]
    [InlineData("| no-partner | −2 | 4 |")]
    [InlineData("| used | 4 | 4 |")]
    [InlineData("| 1 | 0 | 2 |")]
    [InlineData("4 sets have a sample that can be used; 2 sets are used.")]
    [InlineData("| DZ | 0 |")]
    [InlineData("| MZ | 2 |")]
    [InlineData("| age | within 2 | 1 | 1 | 0 |")]
    [InlineData("| age | 40.00 (–) | 43.00 (–) | -3.000 | 3.000 | – |")]
    [InlineData("| P\\|1 | age | within 2 | 40 | 43 |")]
    [InlineData("| unmatched-at-most | 3 of 7 samples without a complete set | at most 43.5% | held |")]
    [InlineData("| tolerance | 1 set outside match-on | refuse | **broken** |")]
    [InlineData("- 1 used set lacks a value that match-on would check. (`match-unknown`)")]
    public void The_page_has_the_line(string line) => Assert.Contains(line, Page);

    [Fact]
    public void A_step_that_took_no_row_is_not_listed() => Assert.DoesNotContain(Page, line => line.Contains("role-missing", StringComparison.Ordinal));

    [Theory]
    [InlineData(Tolerance.Report, "used and listed")]
    [InlineData(Tolerance.Drop, "left out and listed")]
    public void A_breach_that_breaks_no_gate_is_not_called_held(Tolerance tolerance, string result)
    {
        StudyDefinition study = Study with { Gates = new GateSection { Tolerance = tolerance } };
        Assert.Contains($"| {result} |", MatchingPage.Text(study, Audit with { BrokenGates = [] }), StringComparison.Ordinal);
        Assert.Contains("| held |", MatchingPage.Text(study, Audit with { BrokenGates = [], Breaches = [] }), StringComparison.Ordinal);
    }

    [Fact]
    public void Without_promises_there_is_no_balance()
    {
        string page = MatchingPage.Text(Study with { Gates = new GateSection() }, Audit with { Balance = [], Breaches = [], Warnings = [] });
        Assert.DoesNotContain("Balance", page, StringComparison.Ordinal);
        Assert.DoesNotContain("Warnings", page, StringComparison.Ordinal);
        Assert.DoesNotContain("unmatched-at-most", page, StringComparison.Ordinal);
    }

    [Fact]
    public void Every_table_has_as_many_cells_in_each_row_as_in_its_header()
    {
        int width = 0;
        foreach (string line in Page)
        {
            int bars = line.Replace("\\|", "", StringComparison.Ordinal).Count(letter => letter == '|');
            Assert.True(bars == 0 || width == 0 || bars == width, line);
            width = bars;
        }
    }
}
