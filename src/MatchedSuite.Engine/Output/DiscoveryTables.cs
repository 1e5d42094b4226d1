using MatchedSuite.Engine.Adjusting;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Multiplicity;
using MatchedSuite.Storage.Tables;

namespace MatchedSuite.Engine.Output;

/// <summary>Writes what is guaranteed of whole lists: true discoveries among the top k, and in every family.</summary>
/// <remarks>
/// All bounds of one contrast and stratum hold together with confidence 1 − alpha, whoever picks the list and whenever, where Simes'
/// test holds: independent or positively dependent p-values.
/// </remarks>
internal sealed class DiscoveryTables(AnalysisPlan plan, HypothesisTable table, EndpointTraits traits, IReadOnlyList<string> names)
{
    /// <summary>The longest top list of one contrast and stratum that is written.</summary>
    public const int LongestList = 100_000;

    private const int BatchRows = 16_384;

    private static readonly TableColumn[] TopSchema =
    [
        new("contrast", ColumnType.Text), new("stratum", ColumnType.Text), new("k", ColumnType.Integer), new("endpoint", ColumnType.Text),
        new("p_value", ColumnType.Real), new("log10_p", ColumnType.Real), new("true_discoveries", ColumnType.Integer),
    ];

    private static readonly TableColumn[] FamilySchema =
    [
        new("contrast", ColumnType.Text), new("stratum", ColumnType.Text), new("family", ColumnType.Text), new("m", ColumnType.Integer),
        new("simes_p", ColumnType.Real), new("log10_simes_p", ColumnType.Real), new("true_discoveries", ColumnType.Integer),
        new("true_null_share", ColumnType.Real),
    ];

    /// <summary>Writes <c>discoveries.csv</c> and <c>families.csv</c>.</summary>
    /// <returns>The bound of each contrast and stratum as a whole.</returns>
    public IReadOnlyList<GuaranteedDiscoveries> Write(RunFolder folder)
    {
        using var top = new CsvTableSink(folder.PathOf("discoveries.csv"), TopSchema);
        using var families = new CsvTableSink(folder.PathOf("families.csv"), FamilySchema);
        var whole = new List<GuaranteedDiscoveries>();
        foreach (PrimaryList list in PrimaryList.All(table))
        {
            ClosedTesting testing = ClosedTesting.WithSimes(list.P, plan.Study.Analysis.Alpha);
            WriteTop(list, testing, top);
            WriteFamilies(list, testing, families);
            whole.Add(new GuaranteedDiscoveries(list.Contrast, list.Stratum, testing.Tested - testing.TrueNullsAtMost, testing.Tested));
        }

        top.Complete();
        families.Complete();
        return whole;
    }

    private void WriteTop(PrimaryList list, ClosedTesting testing, CsvTableSink sink)
    {
        int[] order = list.ByP();
        int[] bounds = testing.TrueDiscoveriesInTop();
        var batch = new TableBatch(TopSchema, BatchRows);
        for (int k = 0; k < Math.Min(order.Length, LongestList); k++)
        {
            Probability p = list.P[order[k]];
            batch.Text(0)[batch.Rows] = plan.ContrastName(list.Contrast);
            batch.Text(1)[batch.Rows] = plan.StratumName(list.Stratum);
            batch.Integers(2)[batch.Rows] = k + 1;
            batch.Text(3)[batch.Rows] = names[table.Endpoints[list.Rows[order[k]]]];
            batch.Reals(4)[batch.Rows] = p.Value;
            batch.Reals(5)[batch.Rows] = p.Log10;
            batch.Integers(6)[batch.Rows] = bounds[k];
            batch.Rows++;
            batch.FlushWhenFull(sink);
        }

        batch.Flush(sink);
    }

    private void WriteFamilies(PrimaryList list, ClosedTesting testing, CsvTableSink sink)
    {
        string[] familyOf = Array.ConvertAll(list.Rows, row => traits.Family(table.Endpoints[row]));
        var families = new Families(FamilyNumbers.Of(familyOf));
        Probability[] simes = Simes.OfEach(list.P, families);
        var batch = new TableBatch(FamilySchema, families.Count);
        for (int family = 0; family < families.Count; family++)
        {
            int[] members = families.Members(family).ToArray();
            batch.Text(0)[family] = plan.ContrastName(list.Contrast);
            batch.Text(1)[family] = plan.StratumName(list.Stratum);
            batch.Text(2)[family] = familyOf[members[0]];
            batch.Integers(3)[family] = members.Length;
            batch.Reals(4)[family] = simes[family].Value;
            batch.Reals(5)[family] = simes[family].Log10;
            batch.Integers(6)[family] = testing.TrueDiscoveriesAtLeast(members);
            batch.Reals(7)[family] = StoreyPi0.AtFixed(Array.ConvertAll(members, at => list.P[at]));
        }

        batch.Rows = families.Count;
        sink.Write(batch);
    }
}
