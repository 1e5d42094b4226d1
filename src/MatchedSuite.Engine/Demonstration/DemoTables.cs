using System.Globalization;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Demonstration;

/// <summary>The tables every demo has: sample sheet, panel of markers, dictionary, truth.</summary>
internal static class DemoTables
{
    /// <summary>Writes a table of texts.</summary>
    public static void Write(string path, IReadOnlyList<string> columns, IReadOnlyCollection<string?[]> rows)
    {
        TableColumn[] schema = [.. columns.Select(name => new TableColumn(name, ColumnType.Text))];
        using var sink = new CsvTableSink(path, schema);
        var batch = new TableBatch(schema, rows.Count);
        foreach (string?[] row in rows)
        {
            for (int column = 0; column < row.Length; column++)
                batch.Text(column)[batch.Rows] = row[column];
            batch.Rows++;
        }

        sink.Write(batch);
        sink.Complete();
    }

    /// <summary>Writes the measurements: one row a marker, one column a sample.</summary>
    /// <param name="path">Path of the file.</param>
    /// <param name="markers">The markers.</param>
    /// <param name="samples">Names of the samples.</param>
    /// <param name="cell">The value of a marker in a sample, both by position.</param>
    public static void WritePanel(string path, InventedMarker[] markers, IReadOnlyList<string> samples, Func<int, int, string?> cell) =>
        Write(path, ["marker", .. samples], [.. markers.Select((marker, row) =>
            (string?[])[marker.Name, .. Enumerable.Range(0, samples.Count).Select(sample => cell(row, sample))])]);

    /// <summary>Writes what is known of the markers.</summary>
    /// <param name="path">Path of the file.</param>
    /// <param name="markers">The markers.</param>
    /// <param name="limit">Detection limit of a marker; empty where it has none.</param>
    public static void WriteDictionary(string path, InventedMarker[] markers, Func<InventedMarker, string> limit) => Write(
        path, ["endpoint", "label", "kind", "unit", "transform", "detection_limit", "family"],
        [.. markers.Select(marker => (string?[])
        [
            marker.Name, marker.Label, WrittenName.Of(marker.Kind), marker.Unit, WrittenName.Of(marker.Transform), limit(marker), marker.Family,
        ])]);

    /// <summary>Writes which effects were planted.</summary>
    public static void WriteTruth(string path, InventedMarker[] markers) => Write(
        path, ["endpoint", "planted_effect"],
        [.. markers.Select(marker => (string?[])[marker.Name, marker.Effect.ToString("0.##", CultureInfo.InvariantCulture)])]);

    /// <summary>Markers numbered from 1.</summary>
    public static IEnumerable<InventedMarker> Range(int count, Func<int, InventedMarker> marker) => Enumerable.Range(1, count).Select(marker);

    /// <summary>A measured value as a laboratory reports it: four significant digits.</summary>
    public static string Rounded(double value) => double.Parse(
        value.ToString("G4", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture).ToString(CultureInfo.InvariantCulture);
}
