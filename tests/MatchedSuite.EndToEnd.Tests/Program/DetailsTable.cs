using ParquetSharp;

namespace MatchedSuite.EndToEnd.Tests.Program;

/// <summary>A written details.parquet, read by another library than the one that wrote it.</summary>
internal sealed class DetailsTable
{
    private readonly List<(string Endpoint, string Contrast, string Stratum, string Method, string Quantity, double Value)> _rows = [];

    private DetailsTable()
    {
    }

    /// <summary>Reads a file.</summary>
    public static DetailsTable Read(string path)
    {
        var table = new DetailsTable();
        using var file = new ParquetFileReader(path);
        for (int number = 0; number < file.FileMetaData.NumRowGroups; number++)
        {
            using RowGroupReader group = file.RowGroup(number);
            int rows = (int)group.MetaData.NumRows;
            string[][] texts = [.. Enumerable.Range(0, 5).Select(column => group.Column(column).LogicalReader<string>().ReadAll(rows))];
            double?[] values = group.Column(5).LogicalReader<double?>().ReadAll(rows);
            for (int row = 0; row < rows; row++)
                table._rows.Add((texts[0][row], texts[1][row], texts[2][row], texts[3][row], texts[4][row], values[row] ?? double.NaN));
        }

        return table;
    }

    /// <summary>A number of an endpoint and method over all sets, in a study with one contrast.</summary>
    public double this[string endpoint, string method, string quantity] => Assert.Single(Find(endpoint, method, quantity)).Value;

    /// <summary>True where there is such a number.</summary>
    public bool Has(string endpoint, string method, string quantity) => Find(endpoint, method, quantity).Any();

    /// <summary>A number of an endpoint, contrast and method over all sets.</summary>
    public double Number(string endpoint, string contrast, string method, string quantity) =>
        Assert.Single(Find(endpoint, method, quantity), row => row.Contrast == contrast).Value;

    /// <summary>How many numbers of a kind there are.</summary>
    public int Count(string quantity) => _rows.Count(row => row.Quantity == quantity);

    private IEnumerable<(string Endpoint, string Contrast, string Stratum, string Method, string Quantity, double Value)> Find(string endpoint, string method, string quantity) =>
        _rows.Where(row => row.Endpoint == endpoint && row.Stratum.Length == 0 && row.Method == method && row.Quantity == quantity);
}
