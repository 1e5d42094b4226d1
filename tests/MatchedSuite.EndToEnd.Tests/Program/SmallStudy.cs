namespace MatchedSuite.EndToEnd.Tests.Program;

/// <summary>A small sound study of eight pairs and four endpoints.</summary>
internal static class SmallStudy
{
    public const string Study =
        """
        schema: 1
        study: {name: small}
        data: {samples: samples.csv, sample: sample, values: panel.csv, layout: endpoint-rows, endpoint: marker}
        design:
          kind: pairs
          set: pair
          role: {column: exposed, index: "yes", reference: "no"}
        analysis: {continuous: [paired-t, signed-rank], adjust: [bonferroni, holm, bh]}
        output: {folder: results}
        """;

    public static string Samples { get; } = "sample,pair,exposed\n" + string.Concat(
        Enumerable.Range(1, 8).Select(pair => $"s{pair}a,p{pair},yes\ns{pair}b,p{pair},no\n"));

    // The first endpoint: 1.5, 2.1, 0.3, -0.4, 1.1, 0.9, 2.2, 0.7 as differences.
    public static string Panel { get; } =
        "marker," + string.Join(',', Enumerable.Range(1, 8).Select(pair => $"s{pair}a,s{pair}b")) + "\n"
        + "crp,3.5,2,4.1,2,2.3,2,1.6,2,3.1,2,2.9,2,4.2,2,2.7,2\n"
        + "il6,5,4.1,3.9,4.2,4,4.4,5.5,4,4.7,4.9,4.4,4.1,3.2,4,5,4.5\n"
        + "tnf,1.2,1.1,1.4,1.6,,1.1,1.3,1.2,1.9,1.4,1.1,1.6,1.8,1.2,1.5,NA\n"
        + "alb,40,41,39,42,44,40,38,41,45,41,40,42,43,39,41,40\n";
}
