using MatchedSuite.Study.Matching;

namespace MatchedSuite.Study.Tests.Matching;

/// <summary>Matched sets of any shape: what becomes of every row, and who stands where in the end.</summary>
public class SetsDispositionTests
{
    private const string Everything = """
        id,pair,smoker,person,age,zone
        a,S1,yes,p1,40,north
        b,S1,no,p2,41,north
        c,S1,no,p3,45,north
        d,S2,no,p4,50,north
        e,S2,yes,p5,50,north
        f,S2,yes,p6,51,north
        g,S3,yes,p7,33,south
        h,S4,no,p8,33,south
        i,S4,no,p9,34,south
        j,S5,yes,p10,60,south
        k,S5,no,p11,70,south
        l,S6,yes,p12,44,south
        m,S6,no,p2,44,south
        n,S6,no,p13,44,south
        o,S7,yes,p14,55,north
        p,S7,no,p15,55,south
        q,S8,yes,p16,48,south
        r,S8,no,p17,48,south
        s,S8,no,p17,48,south
        t,S8,no,p18,,south
        """;

    private const string Keys = "subject: person\nstratum: zone\nmatch-on: [{column: age, within: 2}]";
    private static readonly string Study = Audits.Sets(Keys + "\nreplicates: first", "tolerance: drop");

    [Fact]
    public void Each_reason_is_given_to_the_row_it_is_for()
    {
        string[] expected =
        [
            "used", "used", "outside-tolerance",
            "used", "used", "used",
            "no-partner", "no-partner", "no-partner",
            "outside-tolerance", "outside-tolerance",
            "used", "person-in-two-sets", "used",
            "stratum-unclear", "stratum-unclear",
            "used", "used", "duplicate-place", "used",
        ];
        MatchingAudit audit = Audits.Of(Study, Everything);
        Assert.Equal(expected, audit.Codes());
        Assert.Equal(20, audit.Counts.Sum(count => count.Rows));
        Assert.Equal((4, 20), (audit.RowsUnmatched, audit.RowsOfInterest));
    }

    [Fact]
    public void Members_lie_set_after_set_with_the_index_role_first()
    {
        Arrangement arrangement = Audits.Of(Study, Everything).Arrangement;
        MemberLayout members = arrangement.Members!;
        Assert.Equal(["S1", "S2", "S6", "S8"], arrangement.Sets);
        Assert.Equal([0, 2, 5, 7, 10], members.Starts);
        Assert.Equal([true, false, true, true, false, true, false, true, false, false], members.IsIndex);
        Assert.Equal("abefdlnqrt", new string([.. members.SheetRows.Select(row => (char)('a' + row))]));
        Assert.Equal(["north", "south"], arrangement.Strata);
        Assert.Equal([0, 0, 1, 1], arrangement.StratumOfSet);
        Assert.Empty(arrangement.Places);
        double[] values = new double[members.Count];
        members.Values.Gather([.. arrangement.Rows.Select(row => (double)row)], values);
        Assert.Equal(members.SheetRows.Select(row => (double)row), values);
    }

    [Fact]
    public void Shapes_are_counted_before_replicates_are_settled()
    {
        Assert.Equal(
            [
                new SetShape(0, 2, 1), new SetShape(1, 0, 1), new SetShape(1, 1, 3), new SetShape(1, 2, 1), new SetShape(1, 3, 1),
                new SetShape(2, 1, 1),
            ],
            Audits.Of(Study, Everything).Shapes);
    }

    [Fact]
    public void A_control_may_serve_several_cases_where_the_study_says_so_and_is_told_of()
    {
        MatchingAudit audit = Audits.Of(Audits.Sets(Keys + "\nreplicates: first\nreuse: allowed", "tolerance: drop"), Everything);
        Assert.Equal(Disposition.Used, audit.Dispositions[12]);
        Assert.Equal(1, audit.Arrangement.PeopleInSeveralSets);
        Assert.Contains(audit.Warnings, warning => warning is { Code: "reused-controls" } && warning.Text.StartsWith("1 person serves", StringComparison.Ordinal));
    }

    [Fact]
    public void A_case_of_two_sets_stays_in_the_first_even_where_reuse_is_allowed()
    {
        const string Sheet = "id,pair,smoker,person\na,P,yes,x\nb,P,no,y\nc,Q,yes,x\nd,Q,no,z\ne,R,yes,w\nf,R,no,x\n";
        MatchingAudit audit = Audits.Of(Audits.Sets("subject: person\nreuse: allowed"), Sheet);
        Assert.Equal(["used", "used", "person-in-two-sets", "no-partner", "used", "used"], audit.Codes());
    }

    [Fact]
    public void One_sample_may_stand_in_several_sets_and_is_read_once()
    {
        const string Sheet = "id,pair,smoker,weight\na,P,yes,70\nb,P,no,60\nc,Q,yes,71\nb,Q,no,61\n";
        MatchingAudit audit = Audits.Of(Audits.Sets("reuse: allowed\ncovariates: [weight]", "", ", values: panel.csv"), Sheet, "a", "b", "c");
        Assert.Equal([0, 1, 2], audit.Arrangement.Rows);
        Assert.Equal(1, audit.Arrangement.PeopleInSeveralSets);
        double[] values = new double[4];
        audit.Arrangement.Members!.Values.Gather([10, 20, 30], values);
        Assert.Equal([10, 20, 30, 20], values);
        Assert.Equal([0, 1, 2, 3], audit.Arrangement.Members.SheetRows);
    }

    [Fact]
    public void Samples_of_one_person_in_a_set_are_averaged_where_the_study_says_so()
    {
        const string Sheet = "id,pair,smoker,person\na,P,yes,x\nb,P,no,y\nc,P,no,y\nd,P,no,z\n";
        MatchingAudit audit = Audits.Of(Audits.Sets("subject: person\nreplicates: mean"), Sheet);
        double[] values = new double[3];
        audit.Arrangement.Members!.Values.Gather([1, 2, 4, 8], values);
        Assert.Equal([1, 3, 8], values);
    }

    [Fact]
    public void Every_case_is_held_against_every_control()
    {
        MatchingAudit audit = Audits.Of(Audits.Sets(Keys), Everything.Replace("s,S8,no,p17,48,south\n", "", StringComparison.Ordinal));
        Assert.Equal(
            [new ToleranceBreach("S1", "age", "40", "45", "within 2"), new ToleranceBreach("S5", "age", "60", "70", "within 2")],
            audit.Breaches);
        Assert.Equal(["person-in-two-sets", "outside-tolerance", "match-unknown", "stratum-unclear"], audit.Warnings.Select(warning => warning.Code));
    }

    [Fact]
    public void The_balance_is_over_people_with_differences_of_means_within_sets()
    {
        const string Sheet = "id,pair,smoker,age\na,P,yes,40\nb,P,no,41\nc,P,no,45\nd,Q,yes,50\ne,Q,no,\nf,Q,no,49\n";
        MatchBalance balance = Assert.Single(Audits.Of(Audits.Sets("match-on: [{column: age, within: 9}]"), Sheet).Balance);
        NumberBalance numbers = balance.Numbers!;
        Assert.Equal((2, 0, 0), (balance.Sets, balance.Unknown, balance.Agreeing));
        Assert.Equal(45, numbers.ReferenceMean, 1e-12);
        Assert.Equal(4, numbers.ReferenceSd, 1e-12); // of 41, 45 and 49
        Assert.Equal(Math.Sqrt(50), numbers.IndexSd, 1e-12); // of 40 and 50
        Assert.Equal(-1, numbers.MeanDifference, 1e-12); // of −3 and 1
        Assert.Equal(5, numbers.LargestDifference);
        Assert.Equal(-1 / Math.Sqrt(33), numbers.StandardisedDifference, 1e-12);
    }
}
