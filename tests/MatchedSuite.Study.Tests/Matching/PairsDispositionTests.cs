using MatchedSuite.Study.Matching;

namespace MatchedSuite.Study.Tests.Matching;

/// <summary>Every row of the sheet gets one disposition, the first that applies.</summary>
public class PairsDispositionTests
{
    private const string Everything = """
        id,pair,smoker,person,age,zygosity
        a,P1,yes,p1,40,MZ
        b,P1,no,p2,40,MZ
        c,,yes,p3,41,MZ
        d,P2,,p4,41,MZ
        e,P2,former,p5,41,MZ
        f,P3,yes,p6,50,DZ
        g,P3,no,p7,50,DZ
        h,P4,yes,p1,40,MZ
        i,P4,no,p8,40,MZ
        j,P5,yes,p9,30,MZ
        k,P5,yes,p9,30,MZ
        l,P5,no,p10,31,MZ
        m,P6,no,p11,31,MZ
        n,P7,yes,p12,60,DZ
        o,P7,no,p13,63,DZ
        p,P8,yes,p14,44,DZ
        q,P8,no,p15,44,MZ
        """;

    private static readonly string Study = Audits.Pairs(
        "subject: person\nstratum: zygosity\nreplicates: first\nmatch-on: [{column: age, within: 2}]",
        "tolerance: drop, unmatched-at-most: 20%",
        ", values: panel.csv");

    private static readonly string[] Measured = [.. "abcdefhijklmnopq".Select(letter => letter.ToString())];

    [Fact]
    public void Each_reason_is_given_in_the_documented_order()
    {
        var audit = Audits.Of(Study, Everything, Measured);
        string[] expected =
        [
            "used", "used", "set-missing", "role-missing", "role-of-no-interest",
            "no-partner", "not-in-values", "person-in-two-sets", "no-partner",
            "used", "duplicate-place", "used", "no-partner", "outside-tolerance", "outside-tolerance",
            "stratum-unclear", "stratum-unclear",
        ];
        Assert.Equal(expected, audit.Codes());
        Assert.Equal(17, audit.Counts.Sum(count => count.Rows));
        Assert.Equal(Enum.GetValues<Disposition>(), audit.Counts.Select(count => count.Disposition));
    }

    [Fact]
    public void The_arrangement_holds_the_used_rows_alone()
    {
        Arrangement arrangement = Audits.Of(Study, Everything, Measured).Arrangement;
        Assert.Equal([0, 1, 9, 11], arrangement.Rows);
        Assert.Equal(["P1", "P5"], arrangement.Sets);
        Assert.Equal(["yes", "no"], arrangement.Places.Select(place => place.Name));
        double[] row = [10, 20, 30, 40];
        double[] values = new double[2];
        arrangement.Places[0].Gather(row, values);
        Assert.Equal([10, 30], values);
        arrangement.Places[1].Gather(row, values);
        Assert.Equal([20, 40], values);
        Assert.Equal(["MZ"], arrangement.Strata);
        Assert.Equal([0, 0], arrangement.StratumOfSet);
    }

    [Fact]
    public void The_unmatched_share_counts_rows_with_a_role_that_end_without_a_complete_set()
    {
        var audit = Audits.Of(Study, Everything, Measured);
        // c has no set, f and g lost each other, h is a person used twice, i and m have no partner;
        // the replicate k has found its set, dropped and unclear sets are complete.
        Assert.Equal(6, audit.RowsUnmatched);
        Assert.Equal(15, audit.RowsOfInterest);
        BrokenGate gate = Assert.Single(audit.BrokenGates);
        Assert.Equal(new BrokenGate("unmatched-at-most", "6 of 15 samples without a complete set (40%)", "at most 20%"), gate);
    }

    [Fact]
    public void Shapes_count_sets_by_their_samples_in_each_role()
    {
        Assert.Equal(
            [new SetShape(0, 1, 2), new SetShape(1, 0, 1), new SetShape(1, 1, 3), new SetShape(2, 1, 1)],
            Audits.Of(Study, Everything, Measured).Shapes);
    }

    [Fact]
    public void What_a_reader_should_know_is_a_warning()
    {
        Assert.Equal(
            ["not-in-values", "person-in-two-sets", "stratum-unclear"],
            Audits.Of(Study, Everything, Measured).Warnings.Select(warning => warning.Code));
    }

    [Fact]
    public void The_table_of_dispositions_names_row_sample_set_and_role()
    {
        var rows = Audits.Of(Study, Everything, Measured).AuditTable;
        Assert.Equal(new AuditedRow(3, "c", null, "yes", Disposition.SetMissing), rows[2]);
        Assert.Equal(new AuditedRow(4, "d", "P2", null, Disposition.RoleMissing), rows[3]);
        Assert.Equal(17, rows.Length);
    }

    [Fact]
    public void Several_samples_in_one_place_are_averaged_where_the_study_says_so()
    {
        var audit = Audits.Of(Audits.Pairs("replicates: mean"), "id,pair,smoker\na,P,yes\nb,P,no\nc,P,yes\nd,Q,yes\ne,Q,no\n");
        Assert.All(audit.Dispositions, disposition => Assert.Equal(Disposition.Used, disposition));
        double[] values = new double[2];
        audit.Arrangement.Places[0].Gather([1, 2, 4, 8, 16], values);
        Assert.Equal([2.5, 8], values);
        audit.Arrangement.Places[1].Gather([1, 2, 4, 8, 16], values);
        Assert.Equal([2, 16], values);
    }

    [Fact]
    public void A_sheet_without_a_key_column_names_samples_by_row()
    {
        string study = Audits.Pairs().With(", sample: id", "");
        var audit = Audits.Of(study, "pair,smoker\nP,yes\nP,no\n");
        Assert.Equal(["1", "2"], audit.AuditTable.Select(row => row.Sample));
    }
}
