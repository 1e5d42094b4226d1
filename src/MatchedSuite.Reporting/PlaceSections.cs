using System.Globalization;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Reporting;

/// <summary>The sections of <c>audit/matching.md</c> on subjects with visits or periods.</summary>
internal static class PlaceSections
{
    /// <summary>Heading and body of each section that has something to say; none for designs without visits or periods.</summary>
    public static IEnumerable<(string Heading, string Body)> Of(MatchingAudit audit)
    {
        if (audit.Patterns is not { } patterns)
            yield break;
        yield return ("Subjects by the samples they have", Patterns(patterns, audit));
        if (audit.Arrangement.GroupOfSet.Length > 0)
            yield return ("Used subjects by group", Groups(patterns, audit.Arrangement));
        if (audit.GroupBalance.Length > 0)
            yield return ("Balance before treatment", Balance(patterns, audit.GroupBalance));
        if (audit.OutOfOrder.Length > 0)
            yield return ("Visits out of order", OutOfOrder(audit.OutOfOrder));
    }

    private static string Patterns(PlacePatterns patterns, MatchingAudit audit)
    {
        var table = new MarkdownTable([.. patterns.Places, .. patterns.Groups.Select(group => group.Length == 0 ? ">subjects" : $">{group}")]);
        foreach (PlacePattern pattern in patterns.Rows)
            table.Row([.. pattern.Present.Select(present => present ? "yes" : "–"), .. pattern.Subjects.Select(Count)]);
        int all = patterns.Rows.Sum(pattern => pattern.Subjects.Sum());
        return string.Create(
            CultureInfo.InvariantCulture, $"{table}\n{all} subjects have a sample that can be used; {audit.Arrangement.Sets.Length} subjects are used.\n");
    }

    private static string Groups(PlacePatterns patterns, Arrangement arrangement)
    {
        var table = new MarkdownTable("group", ">subjects");
        for (int group = 0; group < patterns.Groups.Count; group++)
            table.Row(patterns.Groups[group], Count(arrangement.GroupOfSet.Count(of => of == group)));
        return table.ToString();
    }

    private static string Balance(PlacePatterns patterns, GroupBalance[] balances)
    {
        var table = new MarkdownTable(
            "variable", $">{patterns.Groups[0]}: known", ">mean or share (SD)", $">{patterns.Groups[1]}: known", ">mean or share (SD)", ">standardised difference");
        foreach (GroupBalance balance in balances)
            table.Row(balance.Variable, Count(balance.Index.Known), Moments(balance.Index), Count(balance.Reference.Known), Moments(balance.Reference), NumberText.Quantity(balance.StandardisedDifference));
        return table.ToString();
    }

    private static string Moments(GroupMoments moments) => $"{NumberText.Quantity(moments.Mean)} ({NumberText.Quantity(moments.Sd)})";

    private static string OutOfOrder(OrderBreach[] breaches)
    {
        var table = new MarkdownTable("subject", "visit", ">last day", "next visit", ">first day");
        foreach (OrderBreach breach in breaches)
            table.Row(breach.Subject, breach.Earlier, Day(breach.EarlierDay), breach.Later, Day(breach.LaterDay));
        return table.ToString();
    }

    private static string Day(double day) => day.ToString(CultureInfo.InvariantCulture);

    private static string Count(int value) => value.ToString(CultureInfo.InvariantCulture);
}
