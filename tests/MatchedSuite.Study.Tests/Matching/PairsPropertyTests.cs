using System.Text;
using CsCheck;
using MatchedSuite.Storage;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Study.Tests.Matching;

/// <summary>Laws of the audit over random sheets.</summary>
public class PairsPropertyTests
{
    private static readonly string Study = Audits.Pairs("subject: person\nstratum: zone\nreplicates: first\nmatch-on: [{column: age, within: 2}]", "tolerance: drop");

    private static readonly Gen<string> Cells = Gen.Select(
        OneOf("", "S1", "S2", "S3", "S4", "S5"), OneOf("yes", "no", "no", "yes", "", "former"), Gen.Int[1, 40],
        Gen.Int[30, 33], OneOf("north", "north", "north", "north", "north", "south", ""), (set, role, person, age, zone) => $"{set},{role},{(person > 3 ? set + role : person)},{age},{zone}");

    private static readonly Gen<string[]> Sheets = Cells.Array[2, 16];

    [Fact]
    public void Counts_add_up_and_places_hold_exactly_the_used_rows()
    {
        int audited = 0;
        Sheets.Sample(
            cells =>
            {
                if (Try(Study, Sheet(cells)) is not { } audit)
                    return;
                audited++;
                RequireConsistent(audit, cells);
            },
            iter: 300,
            threads: 1);
        Assert.InRange(audited, 20, 300);
    }

    private static void RequireConsistent(MatchingAudit audit, string[] cells)
    {
        Assert.Equal(cells.Length, audit.Counts.Sum(count => count.Rows));
        Assert.Equal(Enumerable.Range(0, cells.Length).Where(row => audit.Dispositions[row] == Disposition.Used), audit.Arrangement.Rows);
        double[] positions = [.. Enumerable.Range(0, audit.Arrangement.Rows.Length).Select(position => (double)position)];
        var seen = new List<int>();
        foreach (Place place in audit.Arrangement.Places)
        {
            double[] gathered = new double[place.Sets];
            place.Gather(positions, gathered);
            for (int set = 0; set < gathered.Length; set++)
            {
                AuditedRow row = audit.AuditTable[audit.Arrangement.Rows[(int)gathered[set]]];
                Assert.Equal((audit.Arrangement.Sets[set], place.Name), (row.Set, row.Role));
                seen.Add(row.Row);
            }
        }

        Assert.Equal(audit.Arrangement.Rows.Length, seen.Distinct().Count());
    }

    [Fact]
    public void Used_people_stand_in_one_set_each() => Sheets.Sample(
        cells =>
        {
            if (Try(Study, Sheet(cells)) is not { } audit)
                return;
            var used = audit.Arrangement.Rows.Select(row => (Person: cells[row].Split(',')[2], Set: audit.AuditTable[row].Set));
            Assert.All(used.GroupBy(row => row.Person), person => Assert.Single(person.Select(row => row.Set).Distinct()));
        },
        iter: 100,
        threads: 1);

    [Fact]
    public void The_order_of_the_rows_matters_only_where_the_first_in_the_sheet_stays()
    {
        // Every row has a person of its own and replicates are averaged, so that no rule looks at the order.
        string study = Audits.Pairs("stratum: zone\nreplicates: mean\nmatch-on: [{column: age, within: 2}]", "tolerance: drop");
        Gen.Select(Sheets, Gen.Int[0, int.MaxValue]).Sample(
            (cells, seed) =>
            {
                int[] order = [.. Enumerable.Range(0, cells.Length)];
                new Random(seed).Shuffle(order);
                var straight = Try(study, Sheet(cells));
                var shuffled = Try(study, Sheet([.. order.Select(row => cells[row])]));
                Assert.Equal(straight is null, shuffled is null);
                if (straight is null || shuffled is null)
                    return;
                Assert.Equal(order.Select(row => straight.Dispositions[row]), shuffled.Dispositions);
                Assert.Equal(straight.Arrangement.Sets.Order(), shuffled.Arrangement.Sets.Order());
                Assert.Equal(straight.Shapes, shuffled.Shapes);
                Assert.Equal(straight.RowsUnmatched, shuffled.RowsUnmatched);
            },
            iter: 100,
            threads: 1);
    }

    private static Gen<string> OneOf(params string[] texts) => Gen.Int[0, texts.Length - 1].Select(position => texts[position]);

    private static string Sheet(string[] cells)
    {
        var text = new StringBuilder("id,pair,smoker,person,age,zone\n");
        for (int row = 0; row < cells.Length; row++)
            text.Append('s').Append(row).Append(',').Append(cells[row]).Append('\n');
        return text.ToString();
    }

    // Some random sheets have no pair, or two people in one role; those are refused, which other tests look at.
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
