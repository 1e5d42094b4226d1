using System.Buffers;
using System.Numerics;
using MatchedSuite.Storage.Files;
using Parquet;
using Parquet.Schema;

namespace MatchedSuite.Storage.Columnar;

/// <summary>Number columns of a Parquet file as doubles: true is 1, false 0, null NaN.</summary>
internal static class ParquetNumbers
{
    /// <summary>Refuses a column that holds no numbers.</summary>
    public static void Require(ParquetTable table, int column)
    {
        ParquetColumn wanted = table.Columns[column];
        if (!wanted.IsNumber)
            throw new RefusalException($"{InputFile.ShortName(table.Path)}, column '{wanted.Name}'", $"the column holds {wanted.TypeName}",
                "a column of numbers (double, float, integer, decimal) or of true and false",
                "Write it as numbers, or leave it out of the endpoints and samples.");
    }

    /// <summary>Reads one column of one row group.</summary>
    public static void Read(ParquetTable table, int group, int column, double[] target)
    {
        DataField field = table.Columns[column].Field!;
        int rows = table.RowsOfGroup[group];
        table.Read(group, reader => Read(reader, field, rows, target));
    }

    private static int Read(ParquetRowGroupReader reader, DataField field, int rows, double[] target)
    {
        Type type = field.ClrType;
        if (type == typeof(double)) Doubles(reader, field, rows, target);
        else if (type == typeof(float)) Convert<float>(reader, field, rows, target);
        else if (type == typeof(int)) Convert<int>(reader, field, rows, target);
        else if (type == typeof(long)) Convert<long>(reader, field, rows, target);
        else if (type == typeof(decimal)) Convert<decimal>(reader, field, rows, target);
        else if (type == typeof(short)) Convert<short>(reader, field, rows, target);
        else if (type == typeof(sbyte)) Convert<sbyte>(reader, field, rows, target);
        else if (type == typeof(byte)) Convert<byte>(reader, field, rows, target);
        else if (type == typeof(ushort)) Convert<ushort>(reader, field, rows, target);
        else if (type == typeof(uint)) Convert<uint>(reader, field, rows, target);
        else if (type == typeof(ulong)) Convert<ulong>(reader, field, rows, target);
        else Truths(reader, field, rows, target);
        return rows;
    }

    private static void Doubles(ParquetRowGroupReader reader, DataField field, int rows, double[] target)
    {
        if (!field.IsNullable)
        {
            Completed.Wait(reader.ReadAsync(field, target.AsMemory(0, rows)));
            return;
        }
        int[] levels = ArrayPool<int>.Shared.Rent(rows);
        Completed.Wait(reader.ReadRawAsync(field, target.AsMemory(0, rows), levels.AsMemory(0, rows), null));
        int present = levels.AsSpan(0, rows).Count(field.MaxDefinitionLevel);
        // From the end, so that no packed value is overwritten before it has moved to its row; done when no missing row is left before it.
        for (int row = rows - 1; present <= row; row--)
            target[row] = levels[row] == field.MaxDefinitionLevel ? target[--present] : double.NaN;
        ArrayPool<int>.Shared.Return(levels);
    }

    private static void Convert<T>(ParquetRowGroupReader reader, DataField field, int rows, double[] target)
        where T : struct, INumberBase<T> =>
        Expand<T>(reader, field, rows, target, double.CreateChecked);

    private static void Truths(ParquetRowGroupReader reader, DataField field, int rows, double[] target) =>
        Expand<bool>(reader, field, rows, target, value => value ? 1 : 0);

    // The library packs the values that are present; a level of 1 marks their rows.
    private static void Expand<T>(ParquetRowGroupReader reader, DataField field, int rows, double[] target, Func<T, double> convert)
        where T : struct
    {
        T[] packed = ArrayPool<T>.Shared.Rent(rows);
        int[] levels = ArrayPool<int>.Shared.Rent(rows);
        if (field.IsNullable)
        {
            Completed.Wait(reader.ReadRawAsync(field, packed.AsMemory(0, rows), levels.AsMemory(0, rows), null));
            for (int row = 0, next = 0; row < rows; row++)
                target[row] = levels[row] == field.MaxDefinitionLevel ? convert(packed[next++]) : double.NaN;
        }
        else
        {
            Completed.Wait(reader.ReadAsync(field, packed.AsMemory(0, rows)));
            for (int row = 0; row < rows; row++) target[row] = convert(packed[row]);
        }
        ArrayPool<T>.Shared.Return(packed);
        ArrayPool<int>.Shared.Return(levels);
    }
}
