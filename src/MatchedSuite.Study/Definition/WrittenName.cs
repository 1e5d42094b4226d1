using System.Text;

namespace MatchedSuite.Study.Definition;

/// <summary>How the values of the enumerations are written in files: <c>ByFamilyThenAll</c> as <c>by-family-then-all</c>.</summary>
public static class WrittenName
{
    /// <summary>The name of one value.</summary>
    public static string Of<T>(T value)
        where T : struct, Enum
    {
        string name = value.ToString();
        var text = new StringBuilder(name.Length + 4);
        foreach (char letter in name)
        {
            if (char.IsAsciiLetterUpper(letter) && text.Length > 0)
                text.Append('-');
            text.Append(char.ToLowerInvariant(letter));
        }

        return text.ToString();
    }

    /// <summary>The names of all values, in the order in which they are declared.</summary>
    public static IReadOnlyList<string> All<T>()
        where T : struct, Enum => [.. Enum.GetValues<T>().Select(Of)];

    /// <summary>The value with the name; false where there is none.</summary>
    public static bool TryParse<T>(string name, out T value)
        where T : struct, Enum
    {
        foreach (T candidate in Enum.GetValues<T>())
        {
            if (Of(candidate) == name)
            {
                value = candidate;
                return true;
            }
        }

        value = default;
        return false;
    }
}
