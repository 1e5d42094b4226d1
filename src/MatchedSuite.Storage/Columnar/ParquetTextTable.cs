using MatchedSuite.Storage.Tables;
using MatchedSuite.Storage.Text;

namespace MatchedSuite.Storage.Columnar;

/// <summary>Reads a <see cref="TextTable"/> from Parquet.</summary>
internal static class ParquetTextTable
{
    public static IReadOnlyList<string> ReadHeader(string path)
    {
        using ParquetTable table = ParquetTable.Open(path);
        return table.Names;
    }

    public static TextTable Read(string path, TextDialect dialect, Func<string, bool> wanted)
    {
        using ParquetTable table = ParquetTable.Open(path);
        table.RequireRows();
        var missing = new MissingTokens(dialect.Missing);
        var names = new List<string>();
        var cells = new List<string?[]>();
        for (int column = 0; column < table.Names.Count; column++)
        {
            if (table.Names[column].Length == 0 || !wanted(table.Names[column])) continue;
            names.Add(table.Names[column]);
            cells.Add(Read(table, column, missing));
        }
        return new TextTable(path, names, cells, checked((int)table.Rows), lines: null);
    }

    private static string?[] Read(ParquetTable table, int column, MissingTokens missing)
    {
        var all = new List<string?>();
        for (int group = 0; group < table.RowsOfGroup.Count; group++)
            foreach (string? cell in ParquetTexts.Read(table, group, column))
                all.Add(cell is null || missing.Contains(cell) ? null : cell);
        return [.. all];
    }
}
