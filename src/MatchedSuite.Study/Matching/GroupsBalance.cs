using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Compares two groups of subjects on the study's covariates, each subject by the first of its samples at baseline.</summary>
internal static class GroupsBalance
{
    /// <summary>One entry for each covariate that is a number, one for each category of the others.</summary>
    public static GroupBalance[] Of(
        StudyDefinition study, SheetCells cells, IReadOnlyList<SubjectPlaces> subjects, Func<SubjectPlaces, int> groupOf, int place)
    {
        int[] Rows(int group) => [.. subjects.Where(subject => groupOf(subject) == group && subject.Has(place)).Select(subject => subject.Places[place][0])];
        int[] index = Rows(0);
        int[] reference = Rows(1);
        return [.. study.Design.Covariates.SelectMany(column => Compared(column, cells, index, reference))];
    }

    private static IEnumerable<GroupBalance> Compared(string column, SheetCells cells, int[] index, int[] reference)
    {
        string?[] texts = cells.Column(column, "design.covariates");
        int[] rows = [.. index, .. reference];
        if (rows.All(row => texts[row] is not { } text || cells.TryNumber(text, out _)))
            return [GroupBalance.Of(column, index.Select(row => Number(cells, texts[row])), reference.Select(row => Number(cells, texts[row])))];
        string[] levels = [.. rows.Select(row => texts[row]).OfType<string>().Distinct().Order(StringComparer.Ordinal)];
        return levels.Select(level => GroupBalance.Of(
            $"{column}={level}", index.Select(row => Share(texts[row], level)), reference.Select(row => Share(texts[row], level))));
    }

    private static double Number(SheetCells cells, string? text) => text is not null && cells.TryNumber(text, out double value) ? value : double.NaN;

    private static double Share(string? text, string level) => text is null ? double.NaN : text == level ? 1 : 0;
}
