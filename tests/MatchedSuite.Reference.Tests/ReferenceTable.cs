using System.Globalization;
using System.Text;

namespace MatchedSuite.Reference.Tests;

/// <summary>A small comma-separated table below Inputs, one header row; an empty cell is a missing value (NaN).</summary>
internal sealed class ReferenceTable
{
    private readonly string _name;
    private readonly List<string> _header;
    private readonly List<List<string>> _rows;

    private ReferenceTable(string name, List<string> header, List<List<string>> rows) => (_name, _header, _rows) = (name, header, rows);

    /// <summary>Number of rows below the header.</summary>
    public int Rows => _rows.Count;

    /// <summary>Column names, left to right.</summary>
    public IReadOnlyList<string> Columns => _header;

    /// <summary>Reads a file below Inputs.</summary>
    public static ReferenceTable Read(string relativePath)
    {
        string[] lines = File.ReadAllLines(Path.Combine(AppContext.BaseDirectory, "Inputs", relativePath));
        var header = Cells(lines[0]);
        var rows = lines.Skip(1).Where(line => line.Length > 0).Select(Cells).ToList();
        int ragged = rows.FindIndex(row => row.Count != header.Count);
        if (ragged >= 0)
            throw new InvalidDataException($"{relativePath}, row {ragged + 1}: {rows[ragged].Count} cells, the header has {header.Count}.");
        return new ReferenceTable(relativePath, header, rows);
    }

    /// <summary>One column as written.</summary>
    public string[] Texts(string column)
    {
        int index = _header.IndexOf(column);
        return index >= 0
            ? [.. _rows.Select(row => row[index])]
            : throw new ArgumentException($"{_name} has no column '{column}'; it has {string.Join(", ", _header)}.");
    }

    /// <summary>One column as numbers, NaN where the cell is empty or NA.</summary>
    public double[] Numbers(string column) => [.. Texts(column).Select(Number)];

    /// <summary>One column as numbers, only the rows whose <paramref name="key"/> cell is <paramref name="wanted"/>.</summary>
    public double[] Numbers(string column, string key, string wanted)
    {
        string[] keys = Texts(key);
        return [.. Numbers(column).Where((_, row) => keys[row] == wanted)];
    }

    /// <summary>A cell's number; a decimal too small for a double becomes 0.</summary>
    public static double Number(string cell) => cell switch
    {
        "" or "NA" or "NaN" => double.NaN,
        "Inf" or "inf" => double.PositiveInfinity,
        "-Inf" or "-inf" => double.NegativeInfinity,
        _ => double.Parse(cell, NumberStyles.Float, CultureInfo.InvariantCulture),
    };

    private static List<string> Cells(string line)
    {
        var cells = new List<string>();
        var cell = new StringBuilder();
        bool quoted = false;
        for (int i = 0; i < line.Length; i++)
        {
            char c = line[i];
            if (c == '"' && quoted && i + 1 < line.Length && line[i + 1] == '"')
                cell.Append(line[i++]);
            else if (c == '"')
                quoted = !quoted;
            else if (c == ',' && !quoted)
            {
                cells.Add(cell.ToString());
                cell.Clear();
            }
            else
                cell.Append(c);
        }
        cells.Add(cell.ToString());
        return cells;
    }
}
