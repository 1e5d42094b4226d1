using MatchedSuite.Statistics;

namespace MatchedSuite.Engine.Adjusting;

/// <summary>The tested primary rows of one contrast and stratum over all families: what bounds on true discoveries are about.</summary>
/// <param name="Contrast">Position of the contrast in the plan.</param>
/// <param name="Stratum">Code of the stratum.</param>
/// <param name="Rows">The rows in the order of testing.</param>
/// <param name="P">Their p-values.</param>
internal sealed record PrimaryList(short Contrast, short Stratum, int[] Rows, Probability[] P)
{
    /// <summary>Positions in the list, smallest p first; equal ones in the order of testing.</summary>
    public int[] ByP()
    {
        int[] order = [.. Enumerable.Range(0, P.Length)];
        Array.Sort(order, (left, right) =>
        {
            int byP = P[left].CompareTo(P[right]);
            return byP != 0 ? byP : left.CompareTo(right);
        });
        return order;
    }

    /// <summary>Every contrast and stratum that has a tested primary row, in the order of the groups.</summary>
    public static IReadOnlyList<PrimaryList> All(HypothesisTable table)
    {
        IEnumerable<int> primary = Enumerable.Range(0, table.Groups.Count).Where(group => table.Groups[group].Method == HypothesisGroup.PrimaryMethods);
        var rowsOf = new Dictionary<(short Contrast, short Stratum), List<int>>();
        foreach (int row in primary.SelectMany(group => table.Members(group)))
        {
            var key = (table.Contrasts[row], table.Groups[table.GroupOf(row)].Stratum);
            if (!rowsOf.TryGetValue(key, out List<int>? rows))
                rowsOf.Add(key, rows = []);
            rows.Add(row);
        }

        return [.. rowsOf.Select(of =>
        {
            int[] rows = table.InOrderOfTesting(of.Value);
            return new PrimaryList(of.Key.Contrast, of.Key.Stratum, rows, Array.ConvertAll(rows, row => table.P[row]));
        })];
    }
}
