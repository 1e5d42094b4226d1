using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Arranges complete pairs for the run.</summary>
internal static class PairArrangement
{
    /// <summary>The arrangement of the pairs: places index and reference.</summary>
    /// <param name="pairs">Complete pairs, in order of first appearance.</param>
    /// <param name="groups">The two roles.</param>
    /// <param name="strata">Stratum of each row; null when the study has none.</param>
    public static Arrangement Of(IReadOnlyList<SetMembers> pairs, TwoGroups groups, string?[]? strata)
    {
        int[] rows = [.. pairs.SelectMany(pair => pair.Rows).Order()];
        var (names, ofSet) = RoleSets.Strata(pairs, strata);
        return new Arrangement
        {
            Rows = rows,
            Sets = [.. pairs.Select(pair => pair.Set)],
            Places = [PlaceOf(groups.Index, pairs, pair => pair.Index, rows), PlaceOf(groups.Reference, pairs, pair => pair.Reference, rows)],
            Strata = names,
            StratumOfSet = ofSet,
        };
    }

    private static Place PlaceOf(string name, IReadOnlyList<SetMembers> pairs, Func<SetMembers, List<int>> side, int[] rows)
    {
        int[] samples = [.. pairs.SelectMany(side).Select(row => Array.BinarySearch(rows, row))];
        if (pairs.All(pair => side(pair).Count == 1))
            return new Place(name, samples);
        int[] starts = new int[pairs.Count + 1];
        for (int pair = 0; pair < pairs.Count; pair++)
            starts[pair + 1] = starts[pair] + side(pairs[pair]).Count;
        return new Place(name, starts, samples);
    }
}
