namespace MatchedSuite.Study.Matching;

/// <summary>How many subjects have samples in which places, before a subject is judged complete.</summary>
/// <param name="Places">Names of the places: visits or periods.</param>
/// <param name="Groups">Names of the groups of subjects: arms or sequences; one without a name where there are none.</param>
/// <param name="Rows">One entry a pattern that occurs, the fullest and earliest first.</param>
public sealed record PlacePatterns(IReadOnlyList<string> Places, IReadOnlyList<string> Groups, IReadOnlyList<PlacePattern> Rows)
{
    /// <summary>Counts patterns.</summary>
    /// <param name="places">Names of the places.</param>
    /// <param name="groups">Names of the groups.</param>
    /// <param name="subjects">The subjects.</param>
    /// <param name="groupOf">Position of a subject's group.</param>
    internal static PlacePatterns Of(
        IReadOnlyList<string> places, IReadOnlyList<string> groups, IReadOnlyList<SubjectPlaces> subjects, Func<SubjectPlaces, int> groupOf)
    {
        PlacePattern[] rows =
        [
            .. subjects
                .GroupBy(subject => string.Concat(subject.Places.Select(rows => rows.Count > 0 ? '1' : '0')))
                .OrderByDescending(pattern => pattern.Key.Count(mark => mark == '1'))
                .ThenByDescending(pattern => pattern.Key, StringComparer.Ordinal)
                .Select(pattern => new PlacePattern(
                    [.. pattern.Key.Select(mark => mark == '1')],
                    [.. groups.Select((_, group) => pattern.Count(subject => groupOf(subject) == group))])),
        ];
        return new PlacePatterns(places, groups, rows);
    }
}

/// <summary>One pattern.</summary>
/// <param name="Present">For each place, whether there is a sample.</param>
/// <param name="Subjects">Number of subjects, one a group.</param>
public sealed record PlacePattern(IReadOnlyList<bool> Present, IReadOnlyList<int> Subjects);
