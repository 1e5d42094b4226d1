using MatchedSuite.Storage;
using MatchedSuite.Storage.Files;

namespace MatchedSuite.Engine.Tables;

/// <summary>A list of rows that a person chose: a text file with one name a line.</summary>
internal static class NameList
{
    // Comparing a misspelt name with every name of a very long table would take longer than adjusting it.
    private const int MostNamesCompared = 20_000;

    /// <summary>The rows with the listed names; blank lines count for nothing.</summary>
    public static int[] Read(string path, PValueTable table)
    {
        var rowsOf = new Dictionary<string, List<int>>(StringComparer.Ordinal);
        for (int row = 0; row < table.Names.Length; row++)
        {
            if (table.Names[row] is not { } name)
                continue;
            if (!rowsOf.TryGetValue(name, out List<int>? rows))
                rowsOf.Add(name, rows = []);
            rows.Add(row);
        }

        var lineOf = new Dictionary<string, int>(StringComparer.Ordinal);
        var listed = new List<int>();
        foreach (var (name, line) in Lines(path))
        {
            string where = $"{InputFile.ShortName(path)}, line {line}";
            if (!lineOf.TryAdd(name, line))
                throw new RefusalException(where, $"'{name}' is listed on line {lineOf[name]} already", "every name once", "Remove one of the two lines.");
            listed.Add(RowOf(name, where, rowsOf, table));
        }

        return [.. listed];
    }

    private static int RowOf(string name, string where, Dictionary<string, List<int>> rowsOf, PValueTable table)
    {
        if (!rowsOf.TryGetValue(name, out List<int>? rows))
        {
            string? nearest = rowsOf.Count <= MostNamesCompared ? NearestName.Of(name, rowsOf.Keys) : null;
            throw new RefusalException(where, $"there is no row '{name}' in the table", "a name of the column with the names (--name, by default the first)",
                nearest is null ? "" : $"Did you mean '{nearest}'?");
        }

        return rows.Count == 1
            ? rows[0]
            : throw new RefusalException(where, $"'{name}' stands in {rows.Count} rows of the table ({table.Place(rows[0])} and others)",
                "a name that stands for one row", "Name the column whose names tell the rows apart with --name.");
    }

    private static List<(string Name, int Line)> Lines(string path)
    {
        using var reader = new StreamReader(InputFile.Open(path));
        var lines = new List<(string, int)>();
        int number = 0;
        while (reader.ReadLine() is { } line)
        {
            number++;
            if (line.Trim() is { Length: > 0 } name)
                lines.Add((name, number));
        }

        return lines;
    }
}
