using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>The column that says which of two groups a row belongs to.</summary>
internal static class RoleCells
{
    private const int ValuesShown = 10;

    /// <summary>The cells of the column.</summary>
    /// <exception cref="RefusalException">The index or the reference text occurs in no row; the message says which texts do.</exception>
    public static string?[] Of(SheetCells cells, TwoGroups groups, string key)
    {
        string?[] roles = cells.Column(groups.Column, $"{key}.column");
        RequireSeen(cells, groups.Column, roles, groups.Index, $"{key}.index");
        RequireSeen(cells, groups.Column, roles, groups.Reference, $"{key}.reference");
        return roles;
    }

    /// <summary>Refuses a text of the study file that occurs in no row; the message says which texts do.</summary>
    /// <exception cref="RefusalException">It occurs in none.</exception>
    public static void RequireSeen(SheetCells cells, string column, string?[] texts, string wanted, string key)
    {
        if (texts.Contains(wanted))
            return;
        string[] seen = [.. texts.OfType<string>().Distinct().Order(StringComparer.Ordinal)];
        throw new RefusalException(
            $"{cells.File}, column '{column}'",
            $"the value '{wanted}', which the study file names under '{key}', occurs in no row",
            seen.Length == 0 ? "a column that is not empty" : $"one of the values that occur: {Listing.Of(seen, ValuesShown)}",
            NearestName.Of(wanted, seen) is { } nearest ? $"Did you mean '{nearest}'?" : "");
    }
}
