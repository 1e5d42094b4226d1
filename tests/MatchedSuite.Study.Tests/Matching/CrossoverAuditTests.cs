using MatchedSuite.Study.Matching;

namespace MatchedSuite.Study.Tests.Matching;

/// <summary>Crossover: a subject has both periods with one treatment in each, not the same twice.</summary>
public class CrossoverAuditTests
{
    private const string Sheet = """
        id,person,period,drug
        a,P1,1,A
        b,P1,2,B
        c,P2,1,B
        d,P2,2,A
        e,P3,1,A
        f,P3,2,A
        g,P4,1,B
        h,P5,1,A
        i,P5,2,
        j,P6,1,C
        k,P6,2,A
        l,P7,3,A
        m,P8,1,A
        n,P8,1,B
        o,P8,2,B
        """;

    [Fact]
    public void Each_row_has_one_disposition()
    {
        MatchingAudit audit = Audits.Of(PlaceStudies.Crossover(), Sheet);
        string[] expected =
        [
            "used", "used", "used", "used", "sequence-unclear", "sequence-unclear", "no-partner", "no-partner", "role-missing",
            "role-of-no-interest", "no-partner", "role-of-no-interest", "sequence-unclear", "sequence-unclear", "sequence-unclear",
        ];
        Assert.Equal(expected, audit.Codes());
        Assert.Equal(["sequence-unclear"], audit.Warnings.Select(warning => warning.Code));
    }

    [Fact]
    public void Subjects_carry_their_sequence()
    {
        MatchingAudit audit = Audits.Of(PlaceStudies.Crossover(), Sheet);
        Assert.Equal(["P1", "P2"], audit.Arrangement.Sets);
        Assert.Equal([0, 1], audit.Arrangement.GroupOfSet);
        Assert.Equal(["A then B", "B then A"], audit.Patterns!.Groups);
    }

    [Fact]
    public void A_single_period_tells_the_sequence_it_belongs_to()
    {
        // P4 had B first, P5 A first, P6 A second: one, one and another one of each sequence.
        PlacePattern[] rows = [.. Audits.Of(PlaceStudies.Crossover(), Sheet).Patterns!.Rows];
        Assert.Equal([1, 1], rows[0].Subjects);
        Assert.Equal([1, 1], rows[1].Subjects);
        Assert.Equal([0, 1], rows[2].Subjects);
    }

    [Fact]
    public void A_sequence_without_a_complete_subject_is_refused()
    {
        string message = Audits.Refusal(PlaceStudies.Crossover(), Sheet.With("d,P2,2,A\n", "")).Message;
        Assert.Contains("no subject of the group 'B then A' has samples of the periods '1' and '2'", message, StringComparison.Ordinal);
    }
}
