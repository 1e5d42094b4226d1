using System.Text;
using CsCheck;
using MatchedSuite.Storage;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Study.Tests.Matching;

/// <summary>Laws of the audit of matched sets over random sheets.</summary>
public class SetsPropertyTests
{
    private const string Keys = "subject: person\nreplicates: first\nmatch-on: [{column: age, within: 2}]";

    private static readonly Gen<string[]> Sheets = Gen.Select(
        OneOf("", "S1", "S2", "S3", "S4"), OneOf("yes", "no", "no", "no", "", "former"), Gen.Int[1, 60], Gen.Int[30, 33],
        (set, role, person, age) => $"{set},{role},{role}{person},{age}").Array[2, 16];

    [Theory]
    [InlineData("", "tolerance: drop")]
    [InlineData("\nreuse: allowed", "tolerance: drop")]
    [InlineData("\nreuse: allowed", "tolerance: report")]
    public void Members_are_exactly_the_used_rows_and_every_set_has_both_roles(string design, string gates)
    {
        string study = Audits.Sets(Keys + design, gates);
        int audited = 0;
        Sheets.Sample(
            cells =>
            {
                if (Try(study, Sheet(cells)) is not { } audit)
                    return;
                audited++;
                RequireConsistent(audit, cells);
                if (gates.Contains("drop", StringComparison.Ordinal))
                    RequireWithinTolerance(audit, cells);
                if (design.Length == 0)
                    Assert.Equal(0, audit.Arrangement.PeopleInSeveralSets);
            },
            iter: 150,
            threads: 1);
        Assert.InRange(audited, 20, 150);
    }

    [Fact]
    public void The_order_of_the_rows_changes_no_shape_and_no_balance() => Gen.Select(Sheets, Gen.Int[0, int.MaxValue]).Sample(
        (cells, seed) =>
        {
            string study = Audits.Sets("match-on: [{column: age, within: 2}]", "tolerance: drop");
            int[] order = [.. Enumerable.Range(0, cells.Length)];
            new Random(seed).Shuffle(order);
            var straight = Try(study, Sheet(cells));
            var shuffled = Try(study, Sheet([.. order.Select(row => cells[row])]));
            Assert.Equal(straight is null, shuffled is null);
            if (straight is null || shuffled is null)
                return;
            Assert.Equal(order.Select(row => straight.Dispositions[row]), shuffled.Dispositions);
            Assert.Equal(straight.Shapes, shuffled.Shapes);
            Assert.Equal(straight.Balance[0].Agreeing, shuffled.Balance[0].Agreeing);
            Assert.Equal(straight.RowsUnmatched, shuffled.RowsUnmatched);
        },
        iter: 100,
        threads: 1);

    private static void RequireConsistent(MatchingAudit audit, string[] cells)
    {
        Assert.Equal(cells.Length, audit.Counts.Sum(count => count.Rows));
        MemberLayout members = audit.Arrangement.Members!;
        Assert.Equal(Enumerable.Range(0, cells.Length).Where(row => audit.Dispositions[row] == Disposition.Used), members.SheetRows.Order());
        Assert.Equal(audit.Arrangement.Sets.Length + 1, members.Starts.Length);
        for (int set = 0; set < audit.Arrangement.Sets.Length; set++)
        {
            var roles = new HashSet<string>();
            for (int member = members.Starts[set]; member < members.Starts[set + 1]; member++)
            {
                AuditedRow row = audit.AuditTable[members.SheetRows[member]];
                Assert.Equal(audit.Arrangement.Sets[set], row.Set);
                Assert.Equal(members.IsIndex[member], row.Role == "yes");
                roles.Add(row.Role!);
            }

            Assert.Equal(2, roles.Count);
        }
    }

    private static void RequireWithinTolerance(MatchingAudit audit, string[] cells)
    {
        MemberLayout members = audit.Arrangement.Members!;
        for (int set = 0; set < audit.Arrangement.Sets.Length; set++)
        {
            var ages = Enumerable.Range(members.Starts[set], members.Starts[set + 1] - members.Starts[set])
                .ToLookup(member => members.IsIndex[member], member => int.Parse(cells[members.SheetRows[member]].Split(',')[3], null));
            Assert.All(ages[true], index => Assert.All(ages[false], reference => Assert.InRange(Math.Abs(index - reference), 0, 2)));
        }
    }

    private static Gen<string> OneOf(params string[] texts) => Gen.Int[0, texts.Length - 1].Select(position => texts[position]);

    private static string Sheet(string[] cells)
    {
        var text = new StringBuilder("id,pair,smoker,person,age\n");
        for (int row = 0; row < cells.Length; row++)
            text.Append('s').Append(row).Append(',').Append(cells[row]).Append('\n');
        return text.ToString();
    }

    // Some random sheets have no complete set; those are refused, which other tests look at.
    private static MatchingAudit? Try(string study, string sheet)
    {
        try
        {
            return Audits.Of(study, sheet);
        }
        catch (RefusalException)
        {
            return null;
        }
    }
}
