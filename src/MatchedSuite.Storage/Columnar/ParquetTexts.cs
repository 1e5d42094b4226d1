using System.Globalization;
using MatchedSuite.Storage.Files;
using Parquet;
using Parquet.Schema;

namespace MatchedSuite.Storage.Columnar;

/// <summary>Columns of a Parquet file as trimmed text; numbers and dates as the shortest invariant text; null and NaN as null.</summary>
internal static class ParquetTexts
{
    /// <summary>Reads one column of one row group.</summary>
    /// <exception cref="RefusalException">The column is nested or holds bytes.</exception>
    public static string?[] Read(ParquetTable table, int group, int column)
    {
        int rows = table.RowsOfGroup[group];
        ParquetColumn wanted = table.Columns[column];
        if (wanted.Field is null || wanted.IsBytes)
            throw new RefusalException($"{InputFile.ShortName(table.Path)}, column '{wanted.Name}'", $"the column holds {wanted.TypeName}",
                "a column of text, numbers, dates, or true and false", "Write it as text.");
        return table.Read(group, reader => wanted.IsText ? Strings(reader, wanted.Field, rows) : Read(reader, wanted.Field, rows));
    }

    private static string?[] Read(ParquetRowGroupReader reader, DataField field, int rows)
    {
        Type type = field.ClrType;
        if (type == typeof(double)) return Formatted<double>(reader, field, rows, value => double.IsNaN(value) ? null : Invariant(value));
        if (type == typeof(float)) return Formatted<float>(reader, field, rows, value => float.IsNaN(value) ? null : Invariant(value));
        if (type == typeof(decimal)) return Formatted<decimal>(reader, field, rows, value => value.ToString("G29", CultureInfo.InvariantCulture));
        if (type == typeof(bool)) return Formatted<bool>(reader, field, rows, value => value ? "true" : "false");
        if (type == typeof(int)) return Formatted<int>(reader, field, rows, Invariant);
        if (type == typeof(long)) return Formatted<long>(reader, field, rows, Invariant);
        if (type == typeof(short)) return Formatted<short>(reader, field, rows, Invariant);
        if (type == typeof(sbyte)) return Formatted<sbyte>(reader, field, rows, Invariant);
        if (type == typeof(byte)) return Formatted<byte>(reader, field, rows, Invariant);
        if (type == typeof(ushort)) return Formatted<ushort>(reader, field, rows, Invariant);
        if (type == typeof(uint)) return Formatted<uint>(reader, field, rows, Invariant);
        if (type == typeof(ulong)) return Formatted<ulong>(reader, field, rows, Invariant);
        if (type == typeof(DateOnly)) return Formatted<DateOnly>(reader, field, rows, value => value.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture));
        if (type == typeof(TimeOnly)) return Formatted<TimeOnly>(reader, field, rows, value => value.ToString("HH:mm:ss.FFFFFFF", CultureInfo.InvariantCulture));
        if (type == typeof(TimeSpan)) return Formatted<TimeSpan>(reader, field, rows, value => value.ToString("c", CultureInfo.InvariantCulture));
        if (type == typeof(Guid)) return Formatted<Guid>(reader, field, rows, value => value.ToString("D"));
        if (type == typeof(DateTime)) return Formatted<DateTime>(reader, field, rows, value => Moment(value, field));
        throw new NotSupportedException($"column '{field.Name}' of type {type.Name}");
    }

    private static string?[] Strings(ParquetRowGroupReader reader, DataField field, int rows)
    {
        string?[] texts = new string?[rows];
        Completed.Wait(reader.ReadAsync(field, texts.AsMemory()!));
        for (int row = 0; row < rows; row++) texts[row] = texts[row]?.Trim();
        return texts;
    }

    private static string?[] Formatted<T>(ParquetRowGroupReader reader, DataField field, int rows, Func<T, string?> format)
        where T : struct
    {
        string?[] texts = new string?[rows];
        if (field.IsNullable)
        {
            var cells = new T?[rows];
            Completed.Wait(reader.ReadAsync(field, cells.AsMemory()));
            for (int row = 0; row < rows; row++) texts[row] = cells[row] is { } value ? format(value) : null;
        }
        else
        {
            var cells = new T[rows];
            Completed.Wait(reader.ReadAsync(field, cells.AsMemory()));
            for (int row = 0; row < rows; row++) texts[row] = format(cells[row]);
        }
        return texts;
    }

    private static string Invariant<T>(T value)
        where T : IFormattable => value.ToString(null, CultureInfo.InvariantCulture);

    private static string Moment(DateTime value, DataField field) =>
        field is DateTimeDataField { DateTimeFormat: DateTimeFormat.Date }
            ? value.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture)
            : value.ToString("yyyy-MM-dd HH:mm:ss.FFFFFFF", CultureInfo.InvariantCulture);
}
