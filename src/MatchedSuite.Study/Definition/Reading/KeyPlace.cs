using System.Globalization;

namespace MatchedSuite.Study.Definition.Reading;

/// <summary>How a message names a place in a study file.</summary>
internal static class KeyPlace
{
    /// <summary><c>study.yaml, line 12, column 3, key 'analysis.adjust'</c>; without the key where the path is empty.</summary>
    public static string Of(string file, long line, long column, string path)
    {
        string place = string.Create(CultureInfo.InvariantCulture, $"{file}, line {line}, column {column}");
        return path.Length == 0 ? place : $"{place}, key '{path}'";
    }
}
