using System.Globalization;

namespace MatchedSuite.EndToEnd.Tests.Program;

/// <summary>Values from outside, as MatchedSuite.Reference.Tests keeps them with their sources.</summary>
internal static class ReferenceValues
{
    // No sum is held to less than this, whatever the source states.
    private const double Rounding = 1e-12;

    private static readonly Dictionary<(string Dataset, string Case, string Quantity), (double Value, double Tolerance)> Known = Read();

    /// <summary>Full path of a data file.</summary>
    public static string File(string name) => Path.Combine(AppContext.BaseDirectory, "Reference", name);

    /// <summary>One expected value.</summary>
    public static double Of(string dataset, string @case, string quantity) => Known[(dataset, @case, quantity)].Value;

    /// <summary>Lines of a data set without its header, cut at commas.</summary>
    public static string[][] Data(string dataset) =>
        [.. System.IO.File.ReadLines(File($"{dataset}.csv")).Skip(1).Select(line => line.Split(',').Select(cell => cell.Trim('"')).ToArray())];

    /// <summary>Holds a number against its expected value, relative to the tolerance stated there.</summary>
    public static void Equal(string dataset, string @case, string quantity, double found)
    {
        var (value, tolerance) = Known[(dataset, @case, quantity)];
        Assert.True(Math.Abs(found - value) <= tolerance * Math.Abs(value), $"{dataset} {@case} {quantity}: expected {value:R}, found {found:R}");
    }

    // The first five cells are never quoted.
    private static Dictionary<(string, string, string), (double, double)> Read() =>
        System.IO.File.ReadLines(File("expected.csv")).Skip(1)
            .Select(line => line.Split(',', 6))
            .Where(cells => double.TryParse(cells[3], CultureInfo.InvariantCulture, out _))
            .ToDictionary(cells => (cells[0], cells[1], cells[2]), cells => (Number(cells[3]), Math.Max(Number(cells[4]), Rounding)));

    private static double Number(string text) => double.Parse(text, CultureInfo.InvariantCulture);
}
