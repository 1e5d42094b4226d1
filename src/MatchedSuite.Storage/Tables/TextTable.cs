using MatchedSuite.Storage.Columnar;
using MatchedSuite.Storage.Files;
using MatchedSuite.Storage.Text;

namespace MatchedSuite.Storage.Tables;

/// <summary>A small table that is held in memory as text, column by column: a sample sheet, an endpoint dictionary.</summary>
/// <remarks>
/// Read from delimited text or, by the ending <c>.parquet</c>, from Parquet, whose numbers become the shortest invariant text,
/// so that the value 1 of a number column and the cell <c>1</c> of a text file are the same. Cells are trimmed; a missing
/// token is null.
/// </remarks>
public sealed class TextTable
{
    private readonly Dictionary<string, string?[]> _cells;
    private readonly long[]? _lines;

    internal TextTable(string path, IReadOnlyList<string> columns, IReadOnlyList<string?[]> cells, int rows, long[]? lines)
    {
        Path = path;
        Columns = columns;
        Rows = rows;
        _lines = lines;
        _cells = new Dictionary<string, string?[]>(columns.Count, StringComparer.Ordinal);
        for (int column = 0; column < columns.Count; column++) _cells.Add(columns[column], cells[column]);
    }

    /// <summary>The file.</summary>
    public string Path { get; }

    /// <summary>The columns that were read, in file order; columns without a name are left out.</summary>
    public IReadOnlyList<string> Columns { get; }

    /// <summary>Number of rows.</summary>
    public int Rows { get; }

    /// <summary>True when the column was read.</summary>
    public bool Contains(string column) => _cells.ContainsKey(column);

    /// <summary>A column's cells, one for each row; null where missing.</summary>
    /// <exception cref="RefusalException">There is no such column; the message suggests the nearest.</exception>
    public string?[] this[string column]
    {
        get
        {
            if (!_cells.ContainsKey(column)) ColumnNames.Find(InputFile.ShortName(Path), Columns, column);
            return _cells[column];
        }
    }

    /// <summary>Where a row stands, for messages: <c>samples.csv, line 12</c>; in Parquet, which has no lines, <c>row 11</c>.</summary>
    /// <param name="row">The row, from 0.</param>
    public string Place(int row)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(row);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(row, Rows);
        string name = InputFile.ShortName(Path);
        return _lines is null ? $"{name}, row {row + 1}" : $"{name}, line {_lines[row]}";
    }

    /// <summary>Reads a table.</summary>
    /// <param name="path">The file.</param>
    /// <param name="dialect">How delimited text is written; of it, Parquet heeds the missing tokens.</param>
    /// <param name="wanted">True for the columns to keep; null keeps all.</param>
    /// <exception cref="RefusalException">The file cannot be opened or understood; the message says where and why.</exception>
    public static TextTable Read(string path, TextDialect dialect, Func<string, bool>? wanted = null)
    {
        ArgumentNullException.ThrowIfNull(dialect);
        return IsParquet(path)
            ? ParquetTextTable.Read(path, dialect, wanted ?? (_ => true))
            : DelimitedTextTable.Read(path, dialect, wanted ?? (_ => true));
    }

    /// <summary>Reads the column names alone; columns without a name are left out.</summary>
    /// <exception cref="RefusalException">The file cannot be opened or understood.</exception>
    public static IReadOnlyList<string> ReadHeader(string path, TextDialect dialect)
    {
        ArgumentNullException.ThrowIfNull(dialect);
        IReadOnlyList<string> names = IsParquet(path) ? ParquetTextTable.ReadHeader(path) : DelimitedText.Open(path, dialect).Columns;
        return [.. names.Where(name => name.Length > 0)];
    }

    internal static bool IsParquet(string path) => path.EndsWith(".parquet", StringComparison.OrdinalIgnoreCase);
}
