namespace MatchedSuite.Engine.Adjusting;

/// <summary>Families by number, in order of first appearance.</summary>
internal static class FamilyNumbers
{
    /// <summary>The number of each hypothesis' family, from 0.</summary>
    public static int[] Of(IEnumerable<string> families)
    {
        var known = new Dictionary<string, int>(StringComparer.Ordinal);
        var numbers = new List<int>();
        foreach (string family in families)
        {
            known.TryAdd(family, known.Count);
            numbers.Add(known[family]);
        }

        return [.. numbers];
    }
}
