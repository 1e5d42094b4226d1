using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;

namespace MatchedSuite.Engine.Output;

/// <summary>The rows of the summary in its order: the primary row of every endpoint and contrast, smallest p first, untested last.</summary>
/// <param name="Positions">Positions of the rows in the store.</param>
/// <param name="Tested">How many of them have a p-value.</param>
/// <param name="SomeMissing">True where some set lacked a value.</param>
internal sealed record SummaryOrder(int[] Positions, int Tested, bool SomeMissing)
{
    /// <summary>Number of rows.</summary>
    public int Count => Positions.Length;

    /// <summary>The order of a store's rows; equal p-values keep the order of the data.</summary>
    public static SummaryOrder Of(RowStore rows)
    {
        var positions = new List<int>();
        var p = new List<Probability>();
        bool someMissing = false;
        rows.Scan((int position, in ResultRow row) =>
        {
            if (row.Primary == 0 || row.Stratum != ResultRow.AllStrata)
                return;
            positions.Add(position);
            p.Add(row.P);
            someMissing |= row.Missing > 0;
        });
        int[] order = [.. Enumerable.Range(0, positions.Count)];
        Array.Sort(order, (left, right) =>
        {
            int byP = p[left].CompareTo(p[right]);
            return byP != 0 ? byP : left.CompareTo(right);
        });
        return new SummaryOrder([.. order.Select(i => positions[i])], p.Count(value => !value.IsMissing), someMissing);
    }
}
