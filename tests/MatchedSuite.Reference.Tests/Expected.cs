using System.Globalization;

namespace MatchedSuite.Reference.Tests;

/// <summary>The values from outside: every expected number, and the data sets they belong to. Sources stand in Inputs/README.md.</summary>
internal static class Expected
{
    private static readonly Dictionary<(string Dataset, string Case, string Quantity), (string Value, double Tolerance)> Entries = ReadEntries();

    /// <summary>The expected number; text entries "Inf", "-Inf" and "NA" come as the doubles they mean.</summary>
    public static double Value(string dataset, string @case, string quantity) => ReferenceTable.Number(Entry(dataset, @case, quantity).Value);

    /// <summary>The expected entry as it is written: names, verdicts, big integers.</summary>
    public static string Text(string dataset, string @case, string quantity) => Entry(dataset, @case, quantity).Value;

    /// <summary>The relative tolerance the expected number supports; 0 means exactly equal.</summary>
    public static double Tolerance(string dataset, string @case, string quantity) => Entry(dataset, @case, quantity).Tolerance;

    /// <summary>True where such an entry exists.</summary>
    public static bool Has(string dataset, string @case, string quantity) => Entries.ContainsKey((dataset, @case, quantity));

    /// <summary>The cases of one data set, in alphabetical order.</summary>
    public static IEnumerable<string> Cases(string dataset) =>
        Entries.Keys.Where(key => key.Dataset == dataset).Select(key => key.Case).Distinct().Order(StringComparer.Ordinal);

    /// <summary>One data set: Inputs/data/<paramref name="dataset"/>.csv.</summary>
    public static ReferenceTable Table(string dataset) => ReferenceTable.Read(Path.Combine("data", dataset + ".csv"));

    /// <summary>
    /// Fails unless <paramref name="actual"/> lies within the relative tolerance of the entry, or within
    /// <paramref name="atLeast"/> where doubles cannot hold the reference's own (the caller says why).
    /// An expected 0 is compared absolutely, to 1e-9 times <paramref name="scale"/>.
    /// </summary>
    public static void Check(double actual, string dataset, string @case, string quantity, double atLeast = 0, double scale = 1)
    {
        double expected = Value(dataset, @case, quantity);
        double tolerance = Math.Max(Tolerance(dataset, @case, quantity), atLeast);
        bool agrees = double.IsFinite(expected)
            ? Math.Abs(actual - expected) <= (expected == 0 ? 1e-9 * scale : tolerance * Math.Abs(expected))
            : actual.Equals(expected);
        Assert.True(agrees, string.Create(CultureInfo.InvariantCulture,
            $"{dataset}, {@case}, {quantity}: expected {expected:R}, found {actual:R}, relative tolerance {tolerance:G3}."));
    }

    private static (string Value, double Tolerance) Entry(string dataset, string @case, string quantity) =>
        Entries.TryGetValue((dataset, @case, quantity), out var entry)
            ? entry
            : throw new ArgumentException($"Inputs/expected.csv has no entry '{dataset}', '{@case}', '{quantity}'.");

    private static Dictionary<(string Dataset, string Case, string Quantity), (string Value, double Tolerance)> ReadEntries()
    {
        var table = ReferenceTable.Read("expected.csv");
        var (datasets, cases, quantities) = (table.Texts("dataset"), table.Texts("case"), table.Texts("quantity"));
        var (values, tolerances) = (table.Texts("value"), table.Numbers("rtol"));
        var entries = new Dictionary<(string, string, string), (string, double)>(table.Rows);
        for (int i = 0; i < table.Rows; i++)
            entries.Add((datasets[i], cases[i], quantities[i]), (values[i], tolerances[i]));
        return entries;
    }
}
