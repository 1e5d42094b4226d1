using System.Globalization;

namespace MatchedSuite.EndToEnd.Tests.Program;

/// <summary>Values from outside, as MatchedSuite.Reference.Tests keeps them with their sources.</summary>
internal static class ReferenceValues
{
    private static readonly Dictionary<(string Dataset, string Case, string Quantity), double> Known = Read();

    /// <summary>Full path of a data file.</summary>
    public static string File(string name) => Path.Combine(AppContext.BaseDirectory, "Reference", name);

    /// <summary>One expected value.</summary>
    public static double Of(string dataset, string @case, string quantity) => Known[(dataset, @case, quantity)];

    // The first four cells are never quoted.
    private static Dictionary<(string, string, string), double> Read() =>
        System.IO.File.ReadLines(File("expected.csv")).Skip(1)
            .Select(line => line.Split(','))
            .Where(cells => double.TryParse(cells[3], CultureInfo.InvariantCulture, out _))
            .ToDictionary(cells => (cells[0], cells[1], cells[2]), cells => double.Parse(cells[3], CultureInfo.InvariantCulture));
}
