using System.Globalization;
using MatchedSuite.Storage;
using MatchedSuite.Storage.Tables;

namespace MatchedSuite.Study;

/// <summary>A cell of a small table as a number.</summary>
internal static class CellNumber
{
    private const NumberStyles Style = NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent;

    /// <summary>Reads a cell strictly: one finite decimal number, no thousands separators.</summary>
    /// <param name="table">The table; numbers of a Parquet file have become invariant text, whatever mark text files use.</param>
    /// <param name="dialect">How text files are written.</param>
    /// <param name="text">The cell.</param>
    /// <param name="value">The number.</param>
    public static bool TryRead(TextTable table, TextDialect dialect, string text, out double value)
    {
        value = double.NaN;
        bool comma = dialect.DecimalMark == ',' && !table.Path.EndsWith(".parquet", StringComparison.OrdinalIgnoreCase);
        if (comma && text.Contains('.', StringComparison.Ordinal))
            return false;
        string invariant = comma ? text.Replace(',', '.') : text;
        return double.TryParse(invariant, Style, CultureInfo.InvariantCulture, out value) && double.IsFinite(value);
    }
}
