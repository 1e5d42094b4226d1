namespace MatchedSuite.Study.Tests.Matching;

/// <summary>Study files of subjects with visits or periods, with places for more keys.</summary>
internal static class PlaceStudies
{
    public static string Visits(string more = "", string window = "", string gates = "") => Study(
        "kind: visits", $"visit: {{column: visit, order: [v0, v1, v2]{window}}}", more, gates);

    public static string Arms(string more = "", string reference = "v0") => Study(
        "kind: change-by-arm", $"visit: {{column: visit, order: [v0, v1, v2], reference: {reference}}}\narm: {{column: arm, index: new, reference: old}}", more, "");

    public static string Crossover(string more = "") => Study(
        "kind: crossover", "period: {column: period, order: [1, 2]}\ntreatment: {column: drug, index: A, reference: B}", more, "");

    private static string Study(string kind, string places, string more, string gates) => $$"""
        schema: 1
        study: {name: Places}
        data: {samples: samples.csv, sample: id}
        design:
          subject: person
        {{string.Join('\n', $"{kind}\n{places}\n{more}".Split('\n').Select(line => "  " + line))}}
        gates: { {{gates}} }
        """;
}
