using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Reference.Tests;

/// <summary>The matched-set data of Inputs/data: columns set, case and member values, rows of a set together.</summary>
internal static class ReferenceSets
{
    /// <summary>Takes one value column, and covariates if any, of a data set.</summary>
    public static SetSample Of(string dataset, string endpoint, in Scratch.Frame frame, params string[] covariates) =>
        FirstOf(dataset, endpoint, int.MaxValue, frame, covariates);

    /// <summary>The same, only the sets numbered up to <paramref name="last"/>.</summary>
    public static SetSample FirstOf(string dataset, string endpoint, int last, in Scratch.Frame frame, params string[] covariates)
    {
        ReferenceTable table = Expected.Table(dataset);
        string[] sets = table.Texts("set");
        int[] order = [.. Enumerable.Range(0, table.Rows).Where(row => Number(row) <= last).OrderBy(Number)];
        int[] starts = [.. Enumerable.Range(0, order.Length).Where(i => i == 0 || sets[order[i]] != sets[order[i - 1]]), order.Length];
        double[] roles = table.Numbers("case");
        double[] values = table.Numbers(endpoint);
        double[] columns = [.. covariates.SelectMany(name => order.Select(row => table.Numbers(name)[row]))];
        return SetSample.Of(
            [.. order.Select(row => values[row])], starts, [.. order.Select(row => roles[row] == 1)], columns, frame);

        int Number(int row) => int.Parse(sets[row], null);
    }

    /// <summary>The discordant pairs of a 2×2 table as 1:1 sets: b with 1 in the index role and 0 in the other, c the reverse.</summary>
    public static SetSample OfDiscordantPairs(string dataset, in Scratch.Frame frame)
    {
        int b = (int)Expected.Value(dataset, "mcnemar", "b"), c = (int)Expected.Value(dataset, "mcnemar", "c");
        double[] values = [.. Enumerable.Repeat(new double[] { 1, 0 }, b).Concat(Enumerable.Repeat(new double[] { 0, 1 }, c)).SelectMany(pair => pair)];
        return SetSample.Of(
            values,
            [.. Enumerable.Range(0, b + c + 1).Select(s => 2 * s)],
            [.. Enumerable.Range(0, values.Length).Select(i => i % 2 == 0)],
            frame);
    }
}
