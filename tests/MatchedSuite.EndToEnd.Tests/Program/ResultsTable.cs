using System.Globalization;

namespace MatchedSuite.EndToEnd.Tests.Program;

/// <summary>A written results.csv, read with the simplest reader there is: the tests' endpoint names hold no quotes.</summary>
internal sealed class ResultsTable
{
    private readonly string[] _header;
    private readonly List<string[]> _rows;

    private ResultsTable(string[] header, List<string[]> rows)
    {
        _header = header;
        _rows = rows;
    }

    /// <summary>Number of rows.</summary>
    public int Rows => _rows.Count;

    /// <summary>Names of the columns.</summary>
    public IReadOnlyList<string> Columns => _header;

    /// <summary>Reads a file.</summary>
    public static ResultsTable Read(string path)
    {
        string[] lines = File.ReadAllLines(path);
        return new ResultsTable(lines[0].Split(','), [.. lines[1..].Select(line => line.Split(','))]);
    }

    /// <summary>One cell of a row.</summary>
    public string Text(int row, string column) => _rows[row][Array.IndexOf(_header, column)];

    /// <summary>One cell of the row of an endpoint and method over all sets.</summary>
    public string Text(string endpoint, string method, string column) => Text(Find(endpoint, method), column);

    /// <summary>One number of the row of an endpoint and method over all sets.</summary>
    public double Number(string endpoint, string method, string column) =>
        double.Parse(Text(endpoint, method, column), CultureInfo.InvariantCulture);

    /// <summary>The row of an endpoint, contrast, stratum and method.</summary>
    public int Row(string endpoint, string contrast, string stratum, string method)
    {
        (string Column, string Value)[] wanted = [("endpoint", endpoint), ("contrast", contrast), ("stratum", stratum), ("method", method)];
        int row = _rows.FindIndex(cells => wanted.All(of => cells[Array.IndexOf(_header, of.Column)] == of.Value));
        Assert.True(row >= 0, $"There is no row of {endpoint} by {method} in '{contrast}' and stratum '{stratum}'.");
        return row;
    }

    /// <summary>One number of a row; NaN where the cell is empty.</summary>
    public double Number(int row, string column) =>
        Text(row, column) is { Length: > 0 } text ? double.Parse(text, CultureInfo.InvariantCulture) : double.NaN;

    private int Find(string endpoint, string method)
    {
        int row = _rows.FindIndex(cells =>
            cells[Array.IndexOf(_header, "endpoint")] == endpoint && cells[Array.IndexOf(_header, "method")] == method
            && cells[Array.IndexOf(_header, "stratum")].Length == 0);
        Assert.True(row >= 0, $"There is no row of {endpoint} by {method}.");
        return row;
    }
}
