namespace MatchedSuite.Study.Definition;

/// <summary>How a message lists names.</summary>
public static class Listing
{
    // More names than this hide the point of a message.
    private const int MostNames = 20;

    /// <summary>The names in quotes, with commas; a long list is cut and says so.</summary>
    public static string Of(IEnumerable<string> names) => Of(names, MostNames);

    /// <summary>The first <paramref name="most"/> names in quotes, with commas, and how many more there are.</summary>
    public static string Of(IEnumerable<string> names, int most)
    {
        string[] all = [.. names];
        string shown = string.Join(", ", all.Take(most).Select(name => $"'{name}'"));
        return all.Length > most ? $"{shown} and {all.Length - most} more" : shown;
    }
}
