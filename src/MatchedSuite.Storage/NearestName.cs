namespace MatchedSuite.Storage;

/// <summary>The known name that a misspelt one was probably meant to be.</summary>
/// <remarks>
/// <para>Distance is the restricted edit distance: insertions, deletions, substitutions and swaps of neighbours, each one
/// step; letters of another case count as equal, so a name that differs by case alone is always the nearest.</para>
/// <para>Source: Damerau (1964), Communications of the ACM 7(3), 171-176.</para>
/// </remarks>
public static class NearestName
{
    // A third of the letters: beyond it a suggestion is a guess that misleads.
    private const int LettersPerStep = 3;

    // Two names of a matrix with a million columns can be compared in no time; long prose that landed in a header cannot.
    private const int LongestName = 200;

    /// <summary>The nearest of <paramref name="known"/>, or null where none is near enough to be worth a suggestion.</summary>
    /// <param name="wanted">The name as it was written.</param>
    /// <param name="known">The names that exist; of two equally near the first is taken.</param>
    public static string? Of(string wanted, IEnumerable<string> known)
    {
        ArgumentNullException.ThrowIfNull(wanted);
        ArgumentNullException.ThrowIfNull(known);
        string target = wanted.Trim().ToUpperInvariant();
        if (target.Length is 0 or > LongestName) return null;
        int allowed = Math.Max(1, (target.Length + 1) / LettersPerStep);
        string? nearest = null;
        int smallest = allowed + 1;
        foreach (string name in known)
        {
            if (Math.Abs(name.Length - target.Length) >= smallest || name.Length == 0) continue;
            int distance = Distance(target, name.ToUpperInvariant());
            // A name of one or two letters is not "near" a name that shares no letter with it.
            if (distance >= smallest || distance >= Math.Max(target.Length, name.Length)) continue;
            smallest = distance;
            nearest = name;
        }
        return nearest;
    }

    private static int Distance(string first, string second)
    {
        int width = second.Length + 1;
        int[] beforeLast = new int[width];
        int[] last = new int[width];
        int[] current = new int[width];
        for (int column = 0; column < width; column++) last[column] = column;
        for (int row = 1; row <= first.Length; row++)
        {
            current[0] = row;
            for (int column = 1; column < width; column++)
            {
                int change = first[row - 1] == second[column - 1] ? 0 : 1;
                int steps = Math.Min(Math.Min(last[column] + 1, current[column - 1] + 1), last[column - 1] + change);
                bool swapped = row > 1 && column > 1
                    && first[row - 1] == second[column - 2] && first[row - 2] == second[column - 1];
                current[column] = swapped ? Math.Min(steps, beforeLast[column - 2] + change) : steps;
            }
            (beforeLast, last, current) = (last, current, beforeLast);
        }
        return last[second.Length];
    }
}
