using MatchedSuite.Storage;
using MatchedSuite.Storage.Tables;

namespace MatchedSuite.Study.Matching;

/// <summary>Columns of the sample sheet as numbers over the used samples: exposures, times, covariates.</summary>
public sealed class SheetNumbers
{
    private readonly TextTable _sheet;
    private readonly TextDialect _dialect;
    private readonly int[] _rows;

    /// <summary>Numbers of the rows that an arrangement uses, in its order.</summary>
    public SheetNumbers(TextTable sheet, TextDialect dialect, Arrangement arrangement)
        : this(sheet, dialect, arrangement.Rows)
    {
    }

    /// <summary>Numbers of some rows of the sheet, in the order in which they are named.</summary>
    public SheetNumbers(TextTable sheet, TextDialect dialect, int[] rows)
    {
        _sheet = sheet;
        _dialect = dialect;
        _rows = rows;
    }

    /// <summary>One number a used sample; NaN where the cell is missing.</summary>
    /// <param name="column">Name of the column.</param>
    /// <param name="key">Key of the study file that names it, for the message.</param>
    /// <exception cref="RefusalException">A cell is not a number.</exception>
    public double[] Column(string column, string key)
    {
        string?[] cells = _sheet[column];
        return [.. _rows.Select(row => Number(cells[row], row, column, key))];
    }

    /// <summary>The columns that adjust for the named covariates, one number a used sample each.</summary>
    /// <remarks>
    /// A column of numbers stands for itself. A column of texts becomes one 0/1 column for each of its texts but the first in
    /// ordinal order; such a column is named <c>smoking=former</c>. A missing cell is NaN in all of them.
    /// </remarks>
    public IReadOnlyList<Covariate> Covariates(IReadOnlyList<string> columns) => [.. columns.SelectMany(Expanded)];

    private IEnumerable<Covariate> Expanded(string column)
    {
        string?[] cells = _sheet[column];
        if (_rows.All(row => cells[row] is not { } text || CellNumber.TryRead(_sheet, _dialect, text, out _)))
            return [new Covariate(column, Column(column, "design.covariates"))];
        string[] levels = [.. _rows.Select(row => cells[row]).OfType<string>().Distinct().Order(StringComparer.Ordinal)];
        return levels.Skip(1).Select(level => new Covariate(
            $"{column}={level}", [.. _rows.Select(row => cells[row] is { } text ? (text == level ? 1.0 : 0.0) : double.NaN)]));
    }

    private double Number(string? cell, int row, string column, string key)
    {
        if (cell is null)
            return double.NaN;
        return CellNumber.TryRead(_sheet, _dialect, cell, out double value)
            ? value
            : throw new RefusalException(
                $"{_sheet.Place(row)}, column '{column}'", $"'{cell}' is not a number",
                $"a decimal number or a missing mark, since the study file names the column under '{key}'", "Correct the cell.");
    }
}
