namespace MatchedSuite.Study.Matching;

/// <summary>Arranges matched sets for the run.</summary>
internal static class SetArrangement
{
    /// <summary>The arrangement of the sets: their members laid out, no places.</summary>
    /// <param name="sets">Complete sets, in order of first appearance.</param>
    /// <param name="sampleOf">For a row of the sheet, the first row with the same sample.</param>
    public static Arrangement Of(IReadOnlyList<SetPeople> sets, Func<int, int> sampleOf)
    {
        IReadOnlyList<int>[] people = [.. sets.SelectMany(set => set.Everyone)];
        int[] sheetRows = [.. people.SelectMany(rows => rows)];
        int[] rows = [.. sheetRows.Select(sampleOf).Distinct().Order()];
        int[] positions = [.. sheetRows.Select(row => Array.BinarySearch(rows, sampleOf(row)))];
        return new Arrangement
        {
            Rows = rows,
            Sets = [.. sets.Select(set => set.Set)],
            Places = [],
            Members = new MemberLayout
            {
                Starts = [0, .. Ends(sets.Select(set => set.Index.Count + set.Reference.Count))],
                IsIndex = [.. sets.SelectMany(set => set.Index.Select(_ => true).Concat(set.Reference.Select(_ => false)))],
                Values = PlaceOf(people, positions),
                SheetRows = sheetRows,
                Cells = PlaceOf(people, [.. Enumerable.Range(0, sheetRows.Length)]),
            },
        };
    }

    private static Place PlaceOf(IReadOnlyList<int>[] people, int[] positions) =>
        people.All(rows => rows.Count == 1)
            ? new Place("members", positions)
            : new Place("members", [0, .. Ends(people.Select(rows => rows.Count))], positions);

    private static IEnumerable<int> Ends(IEnumerable<int> counts)
    {
        int end = 0;
        foreach (int count in counts)
            yield return end += count;
    }
}
