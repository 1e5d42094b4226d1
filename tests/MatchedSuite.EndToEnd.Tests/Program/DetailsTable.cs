using ParquetSharp;

namespace MatchedSuite.EndToEnd.Tests.Program;

/// <summary>A written details.parquet, read by another library than the one that wrote it.</summary>
internal sealed class DetailsTable
{
    private readonly Dictionary<(string Endpoint, string Stratum, string Method, string Quantity), double> _numbers = [];

    /// <summary>Reads a file.</summary>
    public static DetailsTable Read(string path)
    {
        var table = new DetailsTable();
        using var file = new ParquetFileReader(path);
        for (int number = 0; number < file.FileMetaData.NumRowGroups; number++)
        {
            using RowGroupReader group = file.RowGroup(number);
            int rows = (int)group.MetaData.NumRows;
            string[][] texts = [.. new[] { 0, 2, 3, 4 }.Select(column => group.Column(column).LogicalReader<string>().ReadAll(rows))];
            double?[] values = group.Column(5).LogicalReader<double?>().ReadAll(rows);
            for (int row = 0; row < rows; row++)
                table._numbers.Add((texts[0][row], texts[1][row], texts[2][row], texts[3][row]), values[row] ?? double.NaN);
        }

        return table;
    }

    /// <summary>A number of an endpoint and method over all sets.</summary>
    public double this[string endpoint, string method, string quantity] => _numbers[(endpoint, "", method, quantity)];

    /// <summary>True where there is such a number.</summary>
    public bool Has(string endpoint, string method, string quantity) => _numbers.ContainsKey((endpoint, "", method, quantity));
}
