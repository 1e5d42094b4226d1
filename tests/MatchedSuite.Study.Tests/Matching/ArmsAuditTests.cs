using MatchedSuite.Study.Matching;

namespace MatchedSuite.Study.Tests.Matching;

/// <summary>Change by arm: a subject has one arm, the reference visit and another one.</summary>
public class ArmsAuditTests
{
    private const string Sheet = """
        id,person,visit,arm,age,sex
        a,P1,v0,new,40,f
        b,P1,v1,,40,f
        c,P1,v2,new,40,f
        d,P2,v0,old,50,m
        e,P2,v1,old,51,m
        f,P3,v0,new,60,m
        g,P3,v1,old,60,m
        h,P4,v0,,30,f
        i,P4,v1,,30,f
        j,P5,v0,third,30,f
        k,P5,v1,third,30,f
        l,P6,v1,new,44,f
        m,P6,v2,new,44,f
        n,P7,v0,new,46,m
        o,P7,v2,new,46,m
        """;

    [Fact]
    public void Each_row_has_one_disposition()
    {
        MatchingAudit audit = Audits.Of(PlaceStudies.Arms(), Sheet);
        string[] expected =
        [
            "used", "used", "used", "used", "used", "in-two-arms", "in-two-arms", "role-missing", "role-missing",
            "role-of-no-interest", "role-of-no-interest", "no-partner", "no-partner", "used", "used",
        ];
        Assert.Equal(expected, audit.Codes());
        Assert.Equal(["in-two-arms"], audit.Warnings.Select(warning => warning.Code));
        Assert.Equal((4, 11), (audit.RowsUnmatched, audit.RowsOfInterest));
    }

    [Fact]
    public void Subjects_carry_their_arm()
    {
        Arrangement arrangement = Audits.Of(PlaceStudies.Arms(), Sheet).Arrangement;
        Assert.Equal(["P1", "P2", "P7"], arrangement.Sets);
        Assert.Equal([0, 1, 0], arrangement.GroupOfSet);
    }

    [Fact]
    public void Patterns_are_counted_by_arm()
    {
        PlacePatterns patterns = Audits.Of(PlaceStudies.Arms(), Sheet).Patterns!;
        Assert.Equal(["new", "old"], patterns.Groups);
        Assert.Equal([1, 0], patterns.Rows[0].Subjects);
        Assert.Equal([0, 1], patterns.Rows[1].Subjects);
        Assert.Equal(4, patterns.Rows.Count);
    }

    [Fact]
    public void Covariates_are_compared_between_arms_at_the_reference_visit()
    {
        GroupBalance[] balance = Audits.Of(PlaceStudies.Arms("covariates: [age, sex]"), Sheet).GroupBalance;
        Assert.Equal(["age", "sex=f", "sex=m"], balance.Select(of => of.Variable));
        Assert.Equal(new GroupMoments(2, 43, Math.Sqrt(18)), balance[0].Index); // 40 and 46
        Assert.Equal((1, 50.0), (balance[0].Reference.Known, balance[0].Reference.Mean));
        Assert.Equal((0.5, 0.0), (balance[1].Index.Mean, balance[1].Reference.Mean));
        Assert.True(double.IsNaN(balance[0].StandardisedDifference));
    }

    [Fact]
    public void The_reference_visit_need_not_be_the_first()
    {
        Assert.Equal(["P1", "P6", "P7"], Audits.Of(PlaceStudies.Arms(reference: "v2"), Sheet + "\np,P8,v1,old,1,f\nq,P8,v2,old,1,f\n").Arrangement.Sets[..3]);
    }

    [Fact]
    public void An_arm_without_a_complete_subject_is_refused()
    {
        string message = Audits.Refusal(PlaceStudies.Arms(), Sheet.With("e,P2,v1,old,51,m\n", "")).Message;
        Assert.Contains("no subject of the group 'old' has samples of the visit 'v0' and another one", message, StringComparison.Ordinal);
    }

    [Fact]
    public void An_arm_that_never_occurs_is_refused()
    {
        string message = Audits.Refusal(PlaceStudies.Arms(), Sheet.Replace("old", "Old", StringComparison.Ordinal)).Message;
        Assert.Contains("'design.arm.reference', occurs in no row", message, StringComparison.Ordinal);
    }
}
