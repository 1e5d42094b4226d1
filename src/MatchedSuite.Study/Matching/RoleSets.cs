using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Puts the rows of a two-role design together into sets.</summary>
internal static class RoleSets
{
    /// <summary>The sets with at least one row still <see cref="Disposition.Used"/>, in order of first appearance.</summary>
    public static List<SetMembers> Of(Disposition[] dispositions, string?[] sets, string?[] roles, TwoGroups groups)
    {
        var byName = new Dictionary<string, SetMembers>();
        var inOrder = new List<SetMembers>();
        for (int row = 0; row < dispositions.Length; row++)
        {
            if (dispositions[row] != Disposition.Used)
                continue;
            string name = sets[row]!;
            if (!byName.TryGetValue(name, out var members))
                inOrder.Add(byName[name] = members = new SetMembers(name));
            (roles[row] == groups.Index ? members.Index : members.Reference).Add(row);
        }

        return inOrder;
    }

    /// <summary>How many sets have which numbers of samples, small shapes first.</summary>
    public static SetShape[] Shapes(IEnumerable<SetMembers> sets) =>
        [.. sets.GroupBy(set => (set.Index.Count, set.Reference.Count)).OrderBy(shape => shape.Key)
            .Select(shape => new SetShape(shape.Key.Item1, shape.Key.Item2, shape.Count()))];

    /// <summary>The strata that sets stand in, and for each set the position of its own; both empty where there are none.</summary>
    /// <param name="sets">Sets whose members agree on their stratum.</param>
    /// <param name="strata">Stratum of each row; null when the study has none.</param>
    public static (string[] Names, int[] OfSet) Strata(IReadOnlyList<SetMembers> sets, string?[]? strata)
    {
        if (strata is null)
            return ([], []);
        string[] names = [.. sets.Select(set => strata[set.Index[0]]!).Distinct().Order(StringComparer.Ordinal)];
        return (names, [.. sets.Select(set => Array.IndexOf(names, strata[set.Index[0]]))]);
    }
}
