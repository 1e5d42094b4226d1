using System.Globalization;
using MatchedSuite.Storage;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>The names of the sheet's samples and which of them have measurements.</summary>
internal sealed class SampleNames
{
    private const int NamesShown = 5;

    private readonly string?[] _names;
    private readonly HashSet<string>? _measured;

    private SampleNames(string?[] names, HashSet<string>? measured)
    {
        _names = names;
        _measured = measured;
    }

    /// <summary>Checks the names of the sheet against each other and against those of the measurements.</summary>
    /// <param name="cells">The sheet.</param>
    /// <param name="data">The study file's section <c>data</c>.</param>
    /// <param name="measured">Sample names of the file of measurements; null when the sheet holds them.</param>
    /// <exception cref="RefusalException">A name stands twice; a measured sample is not in the sheet; no sample of the sheet is measured.</exception>
    public static SampleNames Of(SheetCells cells, DataSection data, IReadOnlyList<string>? measured)
    {
        if (data.Sample is null)
            return new SampleNames([.. Enumerable.Range(1, cells.Rows).Select(row => row.ToString(CultureInfo.InvariantCulture))], null);
        string?[] names = cells.Column(data.Sample, "data.sample");
        var rows = new Dictionary<string, int>(names.Length);
        for (int row = 0; row < names.Length; row++)
        {
            if (names[row] is { } name && !rows.TryAdd(name, row))
            {
                throw new RefusalException(
                    $"{cells.Place(row)}, column '{data.Sample}'",
                    $"the sample '{name}' is already on {cells.Place(rows[name])}",
                    "every sample once",
                    "Remove or rename one of the two.");
            }
        }

        if (measured is null)
            return new SampleNames(names, null);
        RefuseStrangers(cells, data, rows, measured);
        return new SampleNames(names, [.. measured]);
    }

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
