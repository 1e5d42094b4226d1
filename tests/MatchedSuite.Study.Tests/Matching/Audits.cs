using MatchedSuite.Storage;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Study.Tests.Matching;

/// <summary>Audits a sample sheet written in a test.</summary>
internal static class Audits
{
    /// <summary>A study of pairs with places for more keys of the design and the gates.</summary>
    public static string Pairs(string design = "", string gates = "", string data = "") => $$"""
        schema: 1
        study: {name: Pairs}
        data: {samples: samples.csv, sample: id{{data}}}
        design:
          kind: pairs
          set: pair
          role: {column: smoker, index: "yes", reference: "no"}
        {{string.Join('\n', design.Split('\n').Select(line => "  " + line))}}
        gates: { {{gates}} }
        """;

    /// <summary>A study of matched sets with places for more keys of the design and the gates.</summary>
    public static string Sets(string design = "", string gates = "", string data = "") =>
        Pairs(design, gates, data).With("kind: pairs", "kind: sets").With("name: Pairs", "name: Sets");

    public static MatchingAudit Of(string study, string sheet, params string[]? measured)
    {
        using var folder = new StudyFolder();
        StudyDefinition definition = StudyReader.Read(folder.Write("study.yaml", study), Capabilities.Everything);
        TextTable table = TextTable.Read(folder.Write("samples.csv", sheet), definition.Data.Dialect);
        return MatchingAudit.Of(definition, table, measured is { Length: 0 } ? null : measured);
    }

    public static RefusalException Refusal(string study, string sheet, params string[]? measured) =>
        Assert.Throws<RefusalException>(() => Of(study, sheet, measured));

    /// <summary>The dispositions as they are written in files.</summary>
    public static string[] Codes(this MatchingAudit audit) => [.. audit.Dispositions.Select(WrittenName.Of)];
}
