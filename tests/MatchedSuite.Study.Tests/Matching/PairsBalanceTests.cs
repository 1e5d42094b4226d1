using MatchedSuite.Study.Matching;

namespace MatchedSuite.Study.Tests.Matching;

/// <summary>What the matching promised, held against the pairs.</summary>
public class PairsBalanceTests
{
    private const string Sheet = """
        id,pair,smoker,age,sex
        a,P1,yes,40,f
        b,P1,no,42,f
        c,P2,yes,50,m
        d,P2,no,47,m
        e,P3,yes,31.3,f
        f,P3,no,29.3,m
        g,P4,yes,,f
        h,P4,no,33,f
        """;

    private const string Promises = "match-on: [{column: age, within: 2}, {column: sex, equal: true}]";

    [Fact]
    public void Breaches_name_set_values_and_promise_and_decimals_at_the_limit_are_none()
    {
        Assert.Equal(
            [new ToleranceBreach("P2", "age", "50", "47", "within 2"), new ToleranceBreach("P3", "sex", "f", "m", "equal")],
            Audits.Of(Audits.Pairs(Promises), Sheet).Breaches);
    }

    [Fact]
    public void Numbers_are_balanced_by_mean_spread_and_difference()
    {
        MatchBalance age = Audits.Of(Audits.Pairs(Promises), Sheet).Balance[0];
        Assert.Equal(("age", 3, 1, 0), (age.Column, age.Sets, age.Unknown, age.Agreeing));
        NumberBalance numbers = age.Numbers!;
        // index 40, 50, 31.3; reference 42, 47, 29.3: sums by hand
        Assert.Equal(121.3 / 3, numbers.IndexMean, 1e-12);
        Assert.Equal(118.3 / 3, numbers.ReferenceMean, 1e-12);
        Assert.Equal(1.0, numbers.MeanDifference, 1e-12);
        Assert.Equal(3.0, numbers.LargestDifference, 1e-12);
        // squares about the mean: 5079.69 - 121.3²/3 and 4831.49 - 118.3²/3
        Assert.Equal(Math.Sqrt((5079.69 - (121.3 * 121.3 / 3)) / 2), numbers.IndexSd, 1e-10);
        Assert.Equal(Math.Sqrt((4831.49 - (118.3 * 118.3 / 3)) / 2), numbers.ReferenceSd, 1e-10);
        double spread = Math.Sqrt((5079.69 + 4831.49 - (121.3 * 121.3 / 3) - (118.3 * 118.3 / 3)) / 4);
        Assert.Equal(1 / spread, numbers.StandardisedDifference, 1e-10);
    }

    [Fact]
    public void Categories_are_balanced_by_agreement()
    {
        MatchBalance sex = Audits.Of(Audits.Pairs(Promises), Sheet).Balance[1];
        Assert.Equal(("sex", "equal", 4, 0, 3), (sex.Column, sex.Promise, sex.Sets, sex.Unknown, sex.Agreeing));
        Assert.Null(sex.Numbers);
    }

    [Fact]
    public void Reported_breaches_and_unknown_values_are_warnings_and_the_sets_are_used()
    {
        var audit = Audits.Of(Audits.Pairs(Promises), Sheet);
        Assert.Equal(["2 sets are outside match-on and are used.", "1 used set lacks a value that match-on would check."], audit.Warnings.Select(warning => warning.Text));
        Assert.Equal(4, audit.Arrangement.Sets.Length);
    }

    [Fact]
    public void Dropped_sets_leave_the_arrangement_and_the_balance()
    {
        var audit = Audits.Of(Audits.Pairs(Promises, "tolerance: drop"), Sheet);
        Assert.Equal(["P1", "P4"], audit.Arrangement.Sets);
        Assert.Equal(2, audit.Breaches.Length);
        Assert.Equal(2, audit.Balance[1].Agreeing);
    }

    [Fact]
    public void A_refused_tolerance_breaks_its_gate()
    {
        BrokenGate gate = Assert.Single(Audits.Of(Audits.Pairs(Promises, "tolerance: refuse"), Sheet).BrokenGates);
        Assert.Equal(new BrokenGate("tolerance", "2 sets outside match-on", "no set outside match-on"), gate);
    }

    [Fact]
    public void A_share_exactly_at_the_limit_does_not_break_the_gate()
    {
        string sheet = "id,pair,smoker\na,P,yes\nb,P,no\nc,Q,yes\nd,R,yes\ne,R,no\n";
        Assert.Empty(Audits.Of(Audits.Pairs("", "unmatched-at-most: 20%"), sheet).BrokenGates);
        Assert.Single(Audits.Of(Audits.Pairs("", "unmatched-at-most: 19.9%"), sheet).BrokenGates);
    }

    [Fact]
    public void A_single_pair_has_no_spread()
    {
        NumberBalance numbers = NumberBalance.Of([[3]], [[2]]);
        Assert.True(double.IsNaN(numbers.IndexSd));
        Assert.True(double.IsNaN(numbers.StandardisedDifference));
        Assert.Equal(0, NumberBalance.Of([[3], [3]], [[3], [3]]).StandardisedDifference);
    }

    [Fact]
    public void A_decimal_comma_is_read_where_the_study_says_so()
    {
        string study = Audits.Pairs("match-on: [{column: age, within: 2}]").With("sample: id", "sample: id, delimiter: \";\", decimal: \",\"");
        var audit = Audits.Of(study, "id;pair;smoker;age\na;P;yes;40,5\nb;P;no;42,75\n");
        Assert.Equal("40.5", Assert.Single(audit.Breaches).Index);
    }
}
