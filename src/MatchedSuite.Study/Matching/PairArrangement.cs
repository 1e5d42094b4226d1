using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Arranges complete pairs for the run.</summary>
internal static class PairArrangement
{
    /// <summary>The arrangement of the pairs: places index and reference.</summary>
    /// <param name="pairs">Complete pairs, in order of first appearance.</param>
    /// <param name="groups">The two roles.</param>
    /// <param name="strata">Stratum of each row; null when the study has none.</param>
    public static Arrangement Of(IReadOnlyList<PairMembers> pairs, TwoGroups groups, string?[]? strata)
    {
        int[] rows = [.. pairs.SelectMany(pair => pair.Rows).Order()];
        string[] names = strata is null ? [] : [.. pairs.Select(pair => strata[pair.Index[0]]!).Distinct().Order(StringComparer.Ordinal)];
        return new Arrangement
        {
            Rows = rows,
            Sets = [.. pairs.Select(pair => pair.Set)],
            Places = [PlaceOf(groups.Index, pairs, pair => pair.Index, rows), PlaceOf(groups.Reference, pairs, pair => pair.Reference, rows)],
            Strata = names,
            StratumOfSet = strata is null ? [] : [.. pairs.Select(pair => Array.IndexOf(names, strata[pair.Index[0]]))],
        };
    }

    private static Place PlaceOf(string name, IReadOnlyList<PairMembers> pairs, Func<PairMembers, List<int>> side, int[] rows)
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
