using System.Globalization;
using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>The names of the sheet's samples and which of them have measurements.</summary>
internal sealed class SampleNames
{
    private const int NamesShown = 5;

    private readonly string?[] _names;
    private readonly Dictionary<string, int> _rows;
    private readonly HashSet<string>? _measured;

    private SampleNames(string?[] names, Dictionary<string, int> rows, HashSet<string>? measured)
    {
        _names = names;
        _rows = rows;
        _measured = measured;
    }

    /// <summary>Checks the names of the sheet against each other and against those of the measurements.</summary>
    /// <param name="cells">The sheet.</param>
    /// <param name="data">The study file's section <c>data</c>.</param>
    /// <param name="measured">Sample names of the file of measurements; null when the sheet holds them.</param>
    /// <param name="sets">Name of each row's set where a sample may stand once in each of several; null where it stands once in the sheet.</param>
    /// <exception cref="RefusalException">A name stands twice; a measured sample is not in the sheet; no sample of the sheet is measured.</exception>
    public static SampleNames Of(SheetCells cells, DataSection data, IReadOnlyList<string>? measured, string?[]? sets = null)
    {
        if (data.Sample is null)
            return new SampleNames([.. Enumerable.Range(1, cells.Rows).Select(row => row.ToString(CultureInfo.InvariantCulture))], [], null);
        string?[] names = cells.Column(data.Sample, "data.sample");
        var rows = new Dictionary<string, int>(names.Length);
        var inSets = new HashSet<(string Name, string Set)>();
        for (int row = 0; row < names.Length; row++)
        {
            if (names[row] is not { } name)
                continue;
            bool again = !rows.TryAdd(name, row);
            bool fresh = sets?[row] is { } set && inSets.Add((name, set));
            if (again && !fresh)
            {
                throw new RefusalException(
                    $"{cells.Place(row)}, column '{data.Sample}'",
                    $"the sample '{name}' is already on {cells.Place(rows[name])}",
                    sets is null ? "every sample once" : "every sample once in a set",
                    "Remove or rename one of the two.");
            }
        }

        if (measured is null)
            return new SampleNames(names, rows, null);
        RefuseStrangers(cells, data, rows, measured);
        return new SampleNames(names, rows, [.. measured]);
    }

    /// <summary>The first row with the same sample as a row; the row itself where its sample has no name.</summary>
    public int FirstRowOf(int row) => _names[row] is { } name && _rows.TryGetValue(name, out int first) ? first : row;

    /// <summary>Name of the sample of a row; empty where it is missing.</summary>
    public string this[int row] => _names[row] ?? "";

    /// <summary>True where the sample of a row has a place in the file of measurements.</summary>
    public bool Measured(int row) => _measured is null || (_names[row] is { } name && _measured.Contains(name));

    private static void RefuseStrangers(SheetCells cells, DataSection data, Dictionary<string, int> rows, IReadOnlyList<string> measured)
    {
        string file = Path.GetFileName(data.Values ?? data.Samples);
        string[] strangers = [.. measured.Where(name => !rows.ContainsKey(name))];
        if (strangers.Length == measured.Count)
        {
            throw new RefusalException(
                $"{file} and {cells.File}",
                $"no sample of the measurements ({Listing.Of(measured, NamesShown)}) is in the column '{data.Sample}' ({Listing.Of(rows.Keys, NamesShown)})",
                "the same sample names in both files",
                "Check data.sample and data.layout.");
        }

        if (strangers.Length > 0)
        {
            throw new RefusalException(
                file,
                $"{strangers.Length} of {measured.Count} samples are not in {cells.File}: {Listing.Of(strangers, NamesShown)}",
                $"every measured sample in the column '{data.Sample}'",
                "Add them to the sample sheet (without a set, if they are not wanted) or correct their names.");
        }
    }
}
