using System.IO.Compression;
using MatchedSuite.Storage.Files;
using MatchedSuite.Storage.Tables;
using Parquet;
using Parquet.Schema;

namespace MatchedSuite.Storage.Columnar;

/// <summary>Copies a Parquet file column by column, each in its own type, and adds columns behind them; row groups stay as they are.</summary>
internal static class ParquetCopy
{
    /// <summary>Writes the copy.</summary>
    /// <exception cref="RefusalException">A column is nested or holds bytes.</exception>
    public static void Write(string source, IReadOnlyList<AddedColumn> added, string target)
    {
        using ParquetTable table = ParquetTable.Open(source);
        DataField[] kept = [.. table.Columns.Select(column => Kept(source, column))];
        DataField[] extra = [.. added.Select(Extra)];
        using var file = new WrittenFile(target);
        file.Guarded(() =>
        {
            var options = new ParquetOptions { CompressionMethod = CompressionMethod.Zstd, CompressionLevel = CompressionLevel.Fastest };
            ParquetWriter writer = Completed.Of(ParquetWriter.CreateAsync(new ParquetSchema([.. kept, .. extra]), new SynchronousStream(file.Stream), options));
            int first = 0;
            for (int group = 0; group < table.RowsOfGroup.Count; group++)
            {
                int rows = table.RowsOfGroup[group];
                using ParquetRowGroupWriter writing = writer.CreateRowGroup();
                for (int column = 0; column < kept.Length; column++) CopyColumn(table, group, column, kept[column], writing);
                for (int column = 0; column < extra.Length; column++) Add(added[column], extra[column], first, rows, writing);
                writing.CompleteValidate();
                first += rows;
            }
            Completed.Wait(writer.DisposeAsync());
        });
        file.Complete();
    }

    private static DataField Kept(string source, ParquetColumn column)
    {
        if (column.Field is null || column.IsBytes)
            throw new RefusalException($"{InputFile.ShortName(source)}, column '{column.Name}'", $"the column holds {column.TypeName}",
                "columns of text, numbers, dates, or true and false", "Leave the column out, or write it as text.");
        DataField field = column.Field;
        return field switch
        {
            DateTimeDataField moment => new DateTimeDataField(moment.Name, moment.DateTimeFormat, moment.IsAdjustedToUTC, moment.Unit, moment.IsNullable),
            DecimalDataField number => new DecimalDataField(number.Name, number.Precision, number.Scale, isNullable: number.IsNullable),
            _ when column.IsText => new DataField<string>(field.Name, nullable: true),
            _ => new DataField(field.Name, field.ClrType, field.IsNullable),
        };
    }

    private static DataField Extra(AddedColumn column) => column.Column.Type == ColumnType.Real
        ? new DataField<double>(column.Column.Name, nullable: true)
        : new DataField<bool>(column.Column.Name, nullable: false);

    private static void Add(AddedColumn column, DataField field, int first, int rows, ParquetRowGroupWriter writing)
    {
        if (column.Column.Type == ColumnType.Truth)
        {
            Completed.Wait(writing.WriteAsync<bool>(field, column.Truths.Slice(first, rows).ToArray().AsMemory()));
            return;
        }
        var cells = new double?[rows];
        for (int row = 0; row < rows; row++)
            cells[row] = double.IsNaN(column.Reals[first + row]) ? null : column.Reals[first + row];
        Completed.Wait(writing.WriteAsync<double>(field, cells.AsMemory()));
    }

    private static void CopyColumn(ParquetTable table, int group, int column, DataField field, ParquetRowGroupWriter writing)
    {
        int rows = table.RowsOfGroup[group];
        if (table.Columns[column].IsText)
        {
            string?[] texts = new string?[rows];
            table.Read(group, reader =>
            {
                Completed.Wait(reader.ReadAsync(table.Columns[column].Field!, texts.AsMemory()!));
                return true;
            });
            Completed.Wait(writing.WriteAsync(field, new ArraySegment<string>(texts!)));
            return;
        }
        Type type = field.ClrType;
        if (type == typeof(double)) Copy<double>();
        else if (type == typeof(float)) Copy<float>();
        else if (type == typeof(decimal)) Copy<decimal>();
        else if (type == typeof(bool)) Copy<bool>();
        else if (type == typeof(int)) Copy<int>();
        else if (type == typeof(long)) Copy<long>();
        else if (type == typeof(short)) Copy<short>();
        else if (type == typeof(sbyte)) Copy<sbyte>();
        else if (type == typeof(byte)) Copy<byte>();
        else if (type == typeof(ushort)) Copy<ushort>();
        else if (type == typeof(uint)) Copy<uint>();
        else if (type == typeof(ulong)) Copy<ulong>();
        else if (type == typeof(DateOnly)) Copy<DateOnly>();
        else if (type == typeof(TimeOnly)) Copy<TimeOnly>();
        else if (type == typeof(TimeSpan)) Copy<TimeSpan>();
        else if (type == typeof(Guid)) Copy<Guid>();
        else if (type == typeof(DateTime)) Copy<DateTime>();
        else throw new RefusalException($"{InputFile.ShortName(table.Path)}, column '{field.Name}'", $"the column holds the type {type.Name}",
            "columns of text, numbers, dates, or true and false", "Leave the column out, or write it as text.");

        void Copy<T>()
            where T : struct
        {
            DataField from = table.Columns[column].Field!;
            if (field.IsNullable)
            {
                var cells = new T?[rows];
                table.Read(group, reader => Done(reader.ReadAsync(from, cells.AsMemory())));
                Completed.Wait(writing.WriteAsync<T>(field, cells.AsMemory()));
            }
            else
            {
                var cells = new T[rows];
                table.Read(group, reader => Done(reader.ReadAsync(from, cells.AsMemory())));
                Completed.Wait(writing.WriteAsync<T>(field, cells.AsMemory()));
            }
        }
    }

    private static bool Done(ValueTask reading)
    {
        Completed.Wait(reading);
        return true;
    }
}
