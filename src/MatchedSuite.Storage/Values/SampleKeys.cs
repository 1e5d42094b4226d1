using System.Globalization;
using MatchedSuite.Storage.Tables;

namespace MatchedSuite.Storage.Values;

/// <summary>The sample names of a table with one row a sample.</summary>
internal static class SampleKeys
{
    /// <summary>The key column's cells.</summary>
    /// <exception cref="RefusalException">A sample has no name, or two have the same.</exception>
    public static string[] Of(TextTable table, string column)
    {
        string?[] cells = table[column];
        var rows = new Dictionary<string, int>(cells.Length, StringComparer.Ordinal);
        for (int row = 0; row < cells.Length; row++)
        {
            if (string.IsNullOrEmpty(cells[row]))
                throw new RefusalException(table.Place(row), $"the sample has no name in column '{column}'", "a name for each sample",
                    "Name it, or remove the line.");
            if (!rows.TryAdd(cells[row]!, row))
                throw new RefusalException(table.Place(row), $"sample '{cells[row]}' stands in column '{column}' a second time, first in {table.Place(rows[cells[row]!])}",
                    "each sample once", "Remove one of them, or give them different names.");
        }
        return cells!;
    }

    /// <summary>Names for rows that have none: 1, 2, 3.</summary>
    public static string[] Numbered(int rows) =>
        [.. Enumerable.Range(1, rows).Select(row => row.ToString(CultureInfo.InvariantCulture))];
}
