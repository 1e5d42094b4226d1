using System.Globalization;
using System.Text;

namespace MatchedSuite.EndToEnd.Tests.Program;

/// <summary>A small sound study of twelve matched sets, 1:1 to 1:3, in two towns, with three endpoints.</summary>
internal static class SmallSets
{
    public const string Study =
        """
        schema: 1
        study: {name: small sets}
        data: {samples: samples.csv, sample: sample, values: panel.csv, layout: endpoint-rows, endpoint: marker}
        design:
          kind: sets
          set: risk_set
          subject: person
          role: {column: status, index: case, reference: control}
        analysis: {continuous: [conditional-logistic, within-set-linear, aligned-rank, set-relabel], adjust: [bonferroni, holm, bh]}
        output: {folder: results}
        """;

    private const int Sets = 12;

    public static string Samples { get; } = Sheet();

    public static string Panel { get; } = "marker," + string.Join(',', Names()) + "\n"
        + Row("crp", (set, place) => 3 + Wave(7 * set + 3 * place) + (place == 0 ? 0.6 : 0))
        + Row("il6", (set, place) => 5 + Wave(5 * set + 11 * place))
        + Row("tnf", (set, place) => 2 + Wave(13 * set + 2 * place) - (place == 0 ? 0.3 : 0));

    /// <summary>The study in a folder of its own.</summary>
    public static StudyFolder Folder()
    {
        var folder = new StudyFolder();
        folder.Write("study.yaml", Study);
        folder.Write("samples.csv", Samples);
        folder.Write("panel.csv", Panel);
        return folder;
    }

    private static IEnumerable<(int Set, int Place)> Members() =>
        Enumerable.Range(1, Sets).SelectMany(set => Enumerable.Range(0, 2 + set % 3).Select(place => (set, place)));

    private static IEnumerable<string> Names() => Members().Select(member => $"s{member.Set}{(char)('a' + member.Place)}");

    private static string Sheet()
    {
        var text = new StringBuilder("sample,risk_set,person,status,town,age,smoking\n");
        foreach (var (set, place) in Members())
        {
            string name = $"s{set}{(char)('a' + place)}";
            text.Append(CultureInfo.InvariantCulture, $"{name},r{set},p{name},{(place == 0 ? "case" : "control")},{(set <= 6 ? "east" : "west")},")
                .Append(CultureInfo.InvariantCulture, $"{40 + set + place % 2},{((set + place) % 3 == 0 ? "yes" : "no")}\n");
        }

        return text.ToString();
    }

    private static string Row(string name, Func<int, int, double> value) => name + ","
        + string.Join(',', Members().Select(member => value(member.Set, member.Place).ToString("F2", CultureInfo.InvariantCulture))) + "\n";

    // Numbers without a pattern that matters, the same everywhere.
    private static double Wave(int position) => position * position * 37 % 101 / 50.0 - 1;
}
