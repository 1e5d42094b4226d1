using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Reference.Tests;

/// <summary>The matched-set data of Inputs/data: columns set, case and member values, rows of a set together.</summary>
internal static class ReferenceSets
{
    /// <summary>Takes one value column, and covariates if any, of a data set.</summary>
    public static SetSample Of(string dataset, string endpoint, in Scratch.Frame frame, params string[] covariates)
    {
        ReferenceTable table = Expected.Table(dataset);
        string[] sets = table.Texts("set");
        int[] order = [.. Enumerable.Range(0, table.Rows).OrderBy(row => int.Parse(sets[row], null))];
        int[] starts = [.. Enumerable.Range(0, order.Length).Where(i => i == 0 || sets[order[i]] != sets[order[i - 1]]), order.Length];
        double[] roles = table.Numbers("case");
        double[] values = table.Numbers(endpoint);
        double[] columns = [.. covariates.SelectMany(name => order.Select(row => table.Numbers(name)[row]))];
        return SetSample.Of(
            [.. order.Select(row => values[row])], starts, [.. order.Select(row => roles[row] == 1)], columns, frame);
    }
}
