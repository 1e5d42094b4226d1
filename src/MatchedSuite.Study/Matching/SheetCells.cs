using System.Globalization;
using MatchedSuite.Storage;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Cells of the sample sheet by the key of the study file that names their column.</summary>
internal sealed class SheetCells
{
    private readonly TextTable _sheet;
    private readonly char _decimalMark;

    /// <summary>The cells of a sheet.</summary>
    public SheetCells(TextTable sheet, TextDialect dialect)
    {
        _sheet = sheet;
        // Numbers of a Parquet file have become invariant text, whatever mark the study's text files use.
        bool parquet = sheet.Path.EndsWith(".parquet", StringComparison.OrdinalIgnoreCase);
        _decimalMark = parquet ? '.' : dialect.DecimalMark;
    }

    /// <summary>Name of the file, for messages.</summary>
    public string File => Path.GetFileName(_sheet.Path);

    /// <summary>Number of rows.</summary>
    public int Rows => _sheet.Rows;

    /// <summary>Where a row stands, for messages.</summary>
    public string Place(int row) => _sheet.Place(row);

    /// <summary>The places of several rows: <c>samples.csv, line 3 and samples.csv, line 9</c>.</summary>
    public string Places(IEnumerable<int> rows) => string.Join(" and ", rows.Select(Place));

    /// <summary>A column's cells, trimmed; null where missing.</summary>
    /// <param name="column">Name of the column.</param>
    /// <param name="key">Key of the study file that names it.</param>
    /// <exception cref="RefusalException">The sheet has no such column.</exception>
    public string?[] Column(string column, string key)
    {
        if (_sheet.Contains(column))
            return _sheet[column];
        throw new RefusalException(
            $"{File}, header",
            $"there is no column '{column}', which the study file names under '{key}'",
            "one of " + Listing.Of(_sheet.Columns),
            NearestName.Of(column, _sheet.Columns) is { } nearest ? $"Did you mean '{nearest}'?" : "");
    }

    /// <summary>A cell of a column as a finite number.</summary>
    /// <exception cref="RefusalException">It is none.</exception>
    public double Number(string column, int row, string text)
    {
        const NumberStyles Style = NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent;
        string invariant = _decimalMark == '.' ? text : text.Contains('.', StringComparison.Ordinal) ? "" : text.Replace(_decimalMark, '.');
        return double.TryParse(invariant, Style, CultureInfo.InvariantCulture, out double value) && double.IsFinite(value)
            ? value
            : throw new RefusalException(
                $"{Place(row)}, column '{column}'",
                $"'{text}' is not a number",
                "a decimal number or a missing mark, since the study file matches this column with 'within'",
                "Correct the cell, or write 'equal: true' for a column of categories.");
    }
}
