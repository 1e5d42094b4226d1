using MatchedSuite.Storage;
using MatchedSuite.Storage.Tables;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Matching;

/// <summary>Cells of the sample sheet by the key of the study file that names their column.</summary>
internal sealed class SheetCells
{
    private readonly TextTable _sheet;
    private readonly TextDialect _dialect;

    /// <summary>The cells of a sheet.</summary>
    public SheetCells(TextTable sheet, TextDialect dialect)
    {
        _sheet = sheet;
        _dialect = dialect;
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
        // The sheet may have been read without its other columns; the header knows them all.
        IReadOnlyList<string> all = TextTable.ReadHeader(_sheet.Path, _dialect);
        throw new RefusalException(
            $"{File}, header",
            $"there is no column '{column}', which the study file names under '{key}'",
            "one of " + Listing.Of(all),
            NearestName.Of(column, all) is { } nearest ? $"Did you mean '{nearest}'?" : "");
    }

    /// <summary>A cell of a column as a finite number.</summary>
    /// <exception cref="RefusalException">It is none.</exception>
    public double Number(string column, int row, string text) =>
        Number(column, row, text, "matches this column with 'within'", "Correct the cell, or write 'equal: true' for a column of categories.");

    /// <summary>A cell of a column as a finite number.</summary>
    /// <param name="column">Name of the column.</param>
    /// <param name="row">Its row.</param>
    /// <param name="text">The cell.</param>
    /// <param name="use">What the study file does with the column, for the message.</param>
    /// <param name="remedy">What to do where it is none.</param>
    /// <exception cref="RefusalException">It is none.</exception>
    public double Number(string column, int row, string text, string use, string remedy) =>
        TryNumber(text, out double value)
            ? value
            : throw new RefusalException(
                $"{Place(row)}, column '{column}'",
                $"'{text}' is not a number",
                $"a decimal number or a missing mark, since the study file {use}",
                remedy);

    /// <summary>True where a cell is a finite number.</summary>
    public bool TryNumber(string text, out double value) => CellNumber.TryRead(_sheet, _dialect, text, out value);
}
