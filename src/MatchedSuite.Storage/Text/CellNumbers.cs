using System.Globalization;
using csFastFloat;

namespace MatchedSuite.Storage.Text;

/// <summary>Cells to doubles, strictly: the whole cell is one finite decimal number, or a missing token.</summary>
/// <remarks>No thousands separators, no hexadecimal, nothing after the number; rounded correctly to the nearest double.</remarks>
internal sealed class CellNumbers(TextDialect dialect)
{
    private readonly MissingTokens _missing = new(dialect.Missing);
    private readonly char _decimalMark = dialect.DecimalMark;

    /// <summary>Reads a trimmed cell.</summary>
    /// <param name="cell">The cell.</param>
    /// <param name="value">The number; NaN where the cell is missing.</param>
    /// <returns>False when the cell is neither; <see cref="Refusal"/> then says why.</returns>
    public bool TryRead(ReadOnlySpan<char> cell, out double value)
    {
        if (_missing.Contains(cell))
        {
            value = double.NaN;
            return true;
        }
        return TryNumber(cell, out value) && double.IsFinite(value);
    }

    /// <summary>Why a cell was not read.</summary>
    public RefusalException Refusal(string where, ReadOnlySpan<char> cell)
    {
        bool infinite = TryNumber(cell, out double value) && double.IsInfinity(value);
        string mark = _decimalMark == ',' ? " with decimal comma" : "";
        string expected = $"a decimal number{mark} or a missing mark ({_missing.Listed})";
        if (infinite && cell.IndexOfAnyInRange('0', '9') >= 0)
            return new RefusalException(where, $"'{Shown(cell)}' is larger than a double can hold (1.8e308)", expected, "Correct the cell.");
        if (infinite)
            return new RefusalException(where, $"'{Shown(cell)}' is infinite", expected, "Correct the cell, or mark it as missing.");
        return new RefusalException(where, $"'{Shown(cell)}' is not a number", expected, Remedy(cell));
    }

    private bool TryNumber(ReadOnlySpan<char> cell, out double value) =>
        FastDoubleParser.TryParseDouble(cell, out int used, out value, NumberStyles.Float, _decimalMark) && used == cell.Length;

    private string Remedy(ReadOnlySpan<char> cell)
    {
        char other = _decimalMark == '.' ? ',' : '.';
        bool swapped = FastDoubleParser.TryParseDouble(cell, out int used, out double _, NumberStyles.Float, other) && used == cell.Length;
        return swapped
            ? $"If the file writes decimals with '{other}', set data.decimal: \"{other}\" in the study file."
            : "Correct the cell, or add its text to data.missing in the study file.";
    }

    private static string Shown(ReadOnlySpan<char> cell) => cell.Length <= 40 ? cell.ToString() : $"{cell[..37]}...";
}
