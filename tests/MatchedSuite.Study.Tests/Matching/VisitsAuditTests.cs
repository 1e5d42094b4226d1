using MatchedSuite.Study.Matching;

namespace MatchedSuite.Study.Tests.Matching;

/// <summary>Repeated visits: what becomes of every row, which subjects are used, and which days look wrong.</summary>
public class VisitsAuditTests
{
    private const string Sheet = """
        id,person,visit,day,sex
        a,P1,v0,0,f
        b,P1,v1,30,f
        c,P1,v2,60,f
        d,P2,v0,0,m
        e,P2,v2,61,m
        f,P3,v1,31,f
        g,,v0,0,f
        h,P4,,5,f
        i,P4,extra,6,f
        j,P4,v1,90,f
        k,P4,v0,0,f
        l,P4,v2,,f
        m,P2,v2,62,m
        """;

    private const string Window = ", window: {column: day, limits: [{visit: v1, from: 20, to: 40}, {visit: v2, from: 50, to: 70}]}";

    [Fact]
    public void Each_row_has_one_disposition_and_they_add_up()
    {
        MatchingAudit audit = Audits.Of(PlaceStudies.Visits("replicates: first", Window), Sheet);
        string[] expected =
        [
            "used", "used", "used", "used", "used", "no-partner", "set-missing", "role-missing", "role-of-no-interest",
            "outside-window", "used", "used", "duplicate-place",
        ];
        Assert.Equal(expected, audit.Codes());
        Assert.Equal(13, audit.Counts.Sum(count => count.Rows));
        Assert.Equal(["day-missing", "outside-window"], audit.Warnings.Select(warning => warning.Code));
    }

    [Fact]
    public void Unmatched_are_those_of_subjects_that_end_incomplete()
    {
        // f has one visit, g no subject; j and m left subjects that are complete without them.
        MatchingAudit audit = Audits.Of(PlaceStudies.Visits("replicates: first", Window, "unmatched-at-most: 15%"), Sheet);
        Assert.Equal((2, 11), (audit.RowsUnmatched, audit.RowsOfInterest));
        Assert.Equal("2 of 11 samples without a complete set (18.18%)", Assert.Single(audit.BrokenGates).Found);
    }

    [Fact]
    public void A_subject_may_lack_a_visit_and_has_no_value_there()
    {
        Arrangement arrangement = Audits.Of(PlaceStudies.Visits("replicates: first", Window), Sheet).Arrangement;
        Assert.Equal(["P1", "P2", "P4"], arrangement.Sets);
        Assert.Equal(["v0", "v1", "v2"], arrangement.Places.Select(place => place.Name));
        double[] values = new double[3];
        arrangement.Places[1].Gather([1, 2, 3, 4, 5, 6, 7], values);
        Assert.Equal([2, double.NaN, double.NaN], values);
        arrangement.Places[2].Gather([1, 2, 3, 4, 5, 6, 7], values);
        Assert.Equal([3, 5, 7], values);
        Assert.Equal([true, false, false], Enumerable.Range(0, 3).Select(arrangement.Places[1].Has));
    }

    [Fact]
    public void Replicates_are_averaged_in_their_visit_and_a_lacking_visit_stays_missing()
    {
        Arrangement arrangement = Audits.Of(PlaceStudies.Visits("replicates: mean"), "id,person,visit\na,P,v0\nb,P,v1\nc,P,v1\nd,Q,v0\ne,Q,v2\n").Arrangement;
        double[] values = new double[2];
        arrangement.Places[1].Gather([1, 2, 4, 8, 16], values);
        Assert.Equal([3, double.NaN], values);
        Assert.False(arrangement.Places[1].Has(1));
    }

    [Fact]
    public void Patterns_count_subjects_by_the_visits_they_have()
    {
        PlacePatterns patterns = Audits.Of(PlaceStudies.Visits("replicates: first", Window), Sheet).Patterns!;
        Assert.Equal(
            ["True True True: 1", "True False True: 2", "False True False: 1"],
            patterns.Rows.Select(row => $"{string.Join(' ', row.Present)}: {row.Subjects[0]}"));
    }

    [Fact]
    public void Visits_out_of_order_are_listed_and_used()
    {
        MatchingAudit audit = Audits.Of(PlaceStudies.Visits("", Window), "id,person,visit,day\na,P,v0,25\nb,P,v1,25\nc,P,v2,55\nd,Q,v0,0\ne,Q,v2,50\n");
        Assert.Equal([new OrderBreach("P", "v0", 25, "v1", 25)], audit.OutOfOrder);
        Assert.Contains(audit.Warnings, warning => warning.Code == "visits-out-of-order");
        Assert.All(audit.Dispositions, disposition => Assert.Equal(Disposition.Used, disposition));
    }

    [Fact]
    public void Strata_are_those_of_subjects()
    {
        MatchingAudit audit = Audits.Of(PlaceStudies.Visits("stratum: sex\nreplicates: first"), Sheet.With("e,P2,v2,61,m", "e,P2,v2,61,f"));
        Assert.Equal(["f"], audit.Arrangement.Strata);
        Assert.Equal([0, 0], audit.Arrangement.StratumOfSet);
        Assert.Equal(2, audit.Codes().Count(code => code == "stratum-unclear"));
    }

    [Fact]
    public void A_visit_twice_is_refused_with_subject_and_lines()
    {
        string message = Audits.Refusal(PlaceStudies.Visits(), Sheet).Message;
        Assert.Contains("samples.csv, line 6 and samples.csv, line 14", message, StringComparison.Ordinal);
        Assert.Contains("the subject 'P2' has 2 samples of 'v2' in 'visit'", message, StringComparison.Ordinal);
        Assert.Contains("design.replicates", message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_visit_that_never_occurs_is_refused_with_those_that_do()
    {
        string message = Audits.Refusal(PlaceStudies.Visits(), Sheet.Replace(",v1,", ",V1,", StringComparison.Ordinal)).Message;
        Assert.Contains("the value 'v1', which the study file names under 'design.visit.order', occurs in no row", message, StringComparison.Ordinal);
        Assert.Contains("Did you mean 'V1'?", message, StringComparison.Ordinal);
    }

    [Fact]
    public void Subjects_with_one_visit_each_are_refused_with_the_flow()
    {
        string message = Audits.Refusal(PlaceStudies.Visits(), "id,person,visit\na,P,v0\nb,Q,v1\nc,R,v2\n").Message;
        Assert.Contains("no subject has samples of two visits (rows: 3 no-partner)", message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_day_that_is_no_number_is_refused()
    {
        string message = Audits.Refusal(PlaceStudies.Visits("", Window), "id,person,visit,day\na,P,v0,0\nb,P,v1,soon\nc,P,v2,50\n").Message;
        Assert.Contains("samples.csv, line 3, column 'day': 'soon' is not a number", message, StringComparison.Ordinal);
    }
}
