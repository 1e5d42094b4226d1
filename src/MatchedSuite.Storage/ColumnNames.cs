namespace MatchedSuite.Storage;

/// <summary>What the names of a table's columns must obey, and how a name that is not among them is answered.</summary>
public static class ColumnNames
{
    private const int NamesShown = 12;

    /// <summary>Refuses a header in which a name stands twice; unnamed columns are no names.</summary>
    public static void RequireDistinct(string where, IReadOnlyList<string> names)
    {
        var seen = new Dictionary<string, int>(names.Count, StringComparer.Ordinal);
        for (int column = 0; column < names.Count; column++)
        {
            if (names[column].Length == 0 || seen.TryAdd(names[column], column)) continue;
            throw new RefusalException(where, $"column '{names[column]}' stands twice (columns {seen[names[column]] + 1} and {column + 1})",
                "each column name once", "Rename or remove one of them.");
        }
    }

    /// <summary>Position of a column.</summary>
    /// <exception cref="RefusalException">There is no such column; the message lists those there are.</exception>
    public static int Find(string where, IReadOnlyList<string> names, string wanted)
    {
        for (int column = 0; column < names.Count; column++)
            if (names[column] == wanted) return column;
        string? nearest = NearestName.Of(wanted, names);
        throw new RefusalException(where, $"there is no column '{wanted}'", $"one of {Listed(names)}",
            nearest is null ? "" : $"Did you mean '{nearest}'?");
    }

    /// <summary>Names as a message shows them, shortened where there are many.</summary>
    public static string Listed(IReadOnlyCollection<string> names)
    {
        string shown = string.Join(", ", names.Where(name => name.Length > 0).Take(NamesShown).Select(name => $"'{name}'"));
        return names.Count > NamesShown ? $"{shown} and {names.Count - NamesShown} more" : shown;
    }
}
