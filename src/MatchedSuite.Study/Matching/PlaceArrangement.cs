namespace MatchedSuite.Study.Matching;

/// <summary>Arranges subjects with their places for the run.</summary>
internal static class PlaceArrangement
{
    /// <summary>The arrangement: one place a visit or period, in which some subjects may have no sample.</summary>
    /// <param name="subjects">The subjects, in order of first appearance.</param>
    /// <param name="places">Names of the places.</param>
    /// <param name="strata">Stratum of each row; null when the study has none.</param>
    /// <param name="groups">Group of each subject; empty when the design has none.</param>
    public static Arrangement Of(IReadOnlyList<SubjectPlaces> subjects, IReadOnlyList<string> places, string?[]? strata, int[] groups)
    {
        int[] rows = [.. subjects.SelectMany(subject => subject.Rows).Order()];
        string[] names = strata is null ? [] : [.. subjects.Select(subject => strata[subject.Rows.First()]!).Distinct().Order(StringComparer.Ordinal)];
        return new Arrangement
        {
            Rows = rows,
            Sets = [.. subjects.Select(subject => subject.Subject)],
            Places = [.. places.Select((name, place) => PlaceOf(name, place, subjects, rows))],
            Strata = names,
            StratumOfSet = strata is null ? [] : [.. subjects.Select(subject => Array.IndexOf(names, strata[subject.Rows.First()]))],
            GroupOfSet = groups,
        };
    }

    private static Place PlaceOf(string name, int place, IReadOnlyList<SubjectPlaces> subjects, int[] rows)
    {
        if (subjects.All(subject => subject.Places[place].Count <= 1))
            return new Place(name, [.. subjects.Select(subject => subject.Has(place) ? Array.BinarySearch(rows, subject.Places[place][0]) : -1)]);
        int[] starts = new int[subjects.Count + 1];
        for (int subject = 0; subject < subjects.Count; subject++)
            starts[subject + 1] = starts[subject] + subjects[subject].Places[place].Count;
        return new Place(name, starts, [.. subjects.SelectMany(subject => subject.Places[place]).Select(row => Array.BinarySearch(rows, row))]);
    }
}
