using System.Globalization;
using System.Text;
using ParquetSharp;

namespace MatchedSuite.Storage.Tests.Values;

/// <summary>Writes a matrix in the layouts and formats that are read; Parquet by an independent writer.</summary>
internal static class MatrixFiles
{
    public static string EndpointRows(ScratchFolder folder, Matrix matrix, char delimiter = ',', string lineEnd = "\n", char decimalMark = '.')
    {
        var text = new StringBuilder("marker");
        foreach (string sample in matrix.Samples) text.Append(delimiter).Append(sample);
        text.Append(lineEnd);
        for (int endpoint = 0; endpoint < matrix.Endpoints.Length; endpoint++)
        {
            text.Append('"').Append(matrix.Endpoints[endpoint]).Append('"');
            for (int sample = 0; sample < matrix.Samples.Length; sample++) text.Append(delimiter).Append(Cell(matrix[endpoint, sample], decimalMark));
            text.Append(lineEnd);
        }
        return folder.Write("panel.csv", text.ToString());
    }

    public static string SampleRows(ScratchFolder folder, Matrix matrix, char delimiter = ',')
    {
        var text = new StringBuilder("sample").Append(delimiter).Append("pair");
        foreach (string endpoint in matrix.Endpoints) text.Append(delimiter).Append(endpoint);
        text.Append('\n');
        for (int sample = 0; sample < matrix.Samples.Length; sample++)
        {
            text.Append(matrix.Samples[sample]).Append(delimiter).Append(CultureInfo.InvariantCulture, $"pair {sample / 2}");
            for (int endpoint = 0; endpoint < matrix.Endpoints.Length; endpoint++) text.Append(delimiter).Append(Cell(matrix[endpoint, sample], '.'));
            text.Append('\n');
        }
        return folder.Write("samples.csv", text.ToString());
    }

    public static string EndpointRowsParquet(ScratchFolder folder, Matrix matrix, int rowsPerGroup)
    {
        string path = folder.File("panel.parquet");
        Column[] columns = [new Column<string>("marker"), .. matrix.Samples.Select(sample => new Column<double?>(sample))];
        using var writer = new ParquetFileWriter(path, columns);
        for (int first = 0; first < matrix.Endpoints.Length; first += rowsPerGroup)
        {
            int[] rows = [.. Enumerable.Range(first, Math.Min(rowsPerGroup, matrix.Endpoints.Length - first))];
            using RowGroupWriter group = writer.AppendRowGroup();
            Put(group, rows.Select(row => matrix.Endpoints[row]).ToArray());
            for (int sample = 0; sample < matrix.Samples.Length; sample++)
                Put(group, rows.Select(row => Nullable(matrix[row, sample])).ToArray());
        }
        writer.Close();
        return path;
    }

    public static string SampleRowsParquet(ScratchFolder folder, Matrix matrix, int rowsPerGroup)
    {
        string path = folder.File("samples.parquet");
        Column[] columns = [new Column<string>("sample"), new Column<int>("pair"), .. matrix.Endpoints.Select(endpoint => new Column<double>(endpoint))];
        using var writer = new ParquetFileWriter(path, columns);
        for (int first = 0; first < matrix.Samples.Length; first += rowsPerGroup)
        {
            int[] rows = [.. Enumerable.Range(first, Math.Min(rowsPerGroup, matrix.Samples.Length - first))];
            using RowGroupWriter group = writer.AppendRowGroup();
            Put(group, rows.Select(row => matrix.Samples[row]).ToArray());
            Put(group, rows.Select(row => row / 2).ToArray());
            for (int endpoint = 0; endpoint < matrix.Endpoints.Length; endpoint++)
                Put(group, rows.Select(row => matrix[endpoint, row]).ToArray());
        }
        writer.Close();
        return path;
    }

    public static void Put<T>(RowGroupWriter group, T[] cells)
    {
        using var column = group.NextColumn().LogicalWriter<T>();
        column.WriteBatch(cells);
    }

    private static double? Nullable(double value) => double.IsNaN(value) ? null : value;

    private static string Cell(double value, char decimalMark) =>
        double.IsNaN(value) ? "NA" : value.ToString(CultureInfo.InvariantCulture).Replace('.', decimalMark);
}
