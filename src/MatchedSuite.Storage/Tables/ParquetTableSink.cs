using System.IO.Compression;
using MatchedSuite.Storage.Columnar;
using Parquet;
using Parquet.Schema;

namespace MatchedSuite.Storage.Tables;

/// <summary>Writes a table as Parquet: compressed by Zstandard, texts by dictionary, NaN as null, row groups of bounded size.</summary>
/// <remarks>The same rows give the same bytes, in whatever batches they come.</remarks>
public sealed class ParquetTableSink : ITableSink
{
    // Rows that wait for their row group, over all columns: 32 MB at 16 bytes a cell.
    private const int CellsPerGroup = 1 << 21;
    private const int FewestRowsPerGroup = 16;
    private const int MostRowsPerGroup = 1 << 16;

    private readonly WrittenFile _file;
    private readonly ParquetWriter _writer;
    private readonly ColumnBuffer[] _buffers;
    private readonly int _rowsPerGroup;
    private int _rows;

    /// <summary>Begins the file, replacing one of that name.</summary>
    /// <exception cref="IOException">The file cannot be written; the message names it.</exception>
    public ParquetTableSink(string path, IReadOnlyList<TableColumn> schema)
    {
        ArgumentNullException.ThrowIfNull(schema);
        _rowsPerGroup = Math.Clamp(CellsPerGroup / Math.Max(1, schema.Count), FewestRowsPerGroup, MostRowsPerGroup);
        _buffers = [.. schema.Select((column, index) => ColumnBuffer.Of(column, index, _rowsPerGroup))];
        _file = new WrittenFile(path);
        // The writer's own default level is the smallest size, which takes thirty times as long for nearly the same size.
        var options = new ParquetOptions { CompressionMethod = CompressionMethod.Zstd, CompressionLevel = CompressionLevel.Fastest };
        foreach (TableColumn column in schema)
            if (column.Type == ColumnType.Text) options.ColumnEncodingHints[column.Name] = EncodingHint.Dictionary;
        var stream = new SynchronousStream(_file.Stream);
        _writer = _file.Guarded(() => Completed.Of(
            ParquetWriter.CreateAsync(new ParquetSchema([.. _buffers.Select(buffer => buffer.Field)]), stream, options)));
    }

    /// <inheritdoc/>
    /// <exception cref="IOException">The disk is full; the message names the file.</exception>
    public void Write(TableBatch batch)
    {
        ArgumentNullException.ThrowIfNull(batch);
        for (int first = 0; first < batch.Rows;)
        {
            int count = Math.Min(batch.Rows - first, _rowsPerGroup - _rows);
            foreach (ColumnBuffer buffer in _buffers) buffer.Take(batch, first, count, _rows);
            first += count;
            _rows += count;
            if (_rows == _rowsPerGroup) _file.Guarded(WriteGroup);
        }
    }

    /// <inheritdoc/>
    public void Complete()
    {
        _file.Guarded(() =>
        {
            if (_rows > 0) WriteGroup();
            Completed.Wait(_writer.DisposeAsync());
        });
        _file.Complete();
    }

    /// <inheritdoc/>
    /// <remarks>The library's writer is left alone unless completed: disposing it would end an unfinished file as if it were whole.</remarks>
    public void Dispose() => _file.Dispose();

    private void WriteGroup()
    {
        using ParquetRowGroupWriter group = _writer.CreateRowGroup();
        foreach (ColumnBuffer buffer in _buffers) buffer.Write(group, _rows);
        group.CompleteValidate();
        _rows = 0;
    }

    /// <summary>The rows of one column that wait for their row group.</summary>
    private abstract class ColumnBuffer
    {
        public required DataField Field { get; init; }

        public required int Column { get; init; }

        public static ColumnBuffer Of(TableColumn column, int index, int rows) => column.Type switch
        {
            ColumnType.Text => new Texts(rows) { Field = new DataField<string>(column.Name, nullable: true), Column = index },
            ColumnType.Integer => new Integers(rows) { Field = new DataField<int>(column.Name, nullable: false), Column = index },
            ColumnType.Real => new Reals(rows) { Field = new DataField<double>(column.Name, nullable: true), Column = index },
            _ => new Truths(rows) { Field = new DataField<bool>(column.Name, nullable: false), Column = index },
        };

        public abstract void Take(TableBatch batch, int first, int count, int at);

        public abstract void Write(ParquetRowGroupWriter group, int rows);
    }

    private sealed class Texts(int rows) : ColumnBuffer
    {
        private readonly string?[] _cells = new string?[rows];

        public override void Take(TableBatch batch, int first, int count, int at) =>
            Array.Copy(batch.Text(Column), first, _cells, at, count);

        public override void Write(ParquetRowGroupWriter group, int rows) =>
            Completed.Wait(group.WriteAsync(Field, new ArraySegment<string>(_cells!, 0, rows)));
    }

    private sealed class Integers(int rows) : ColumnBuffer
    {
        private readonly int[] _cells = new int[rows];

        public override void Take(TableBatch batch, int first, int count, int at) =>
            Array.Copy(batch.Integers(Column), first, _cells, at, count);

        public override void Write(ParquetRowGroupWriter group, int rows) =>
            Completed.Wait(group.WriteAsync<int>(Field, _cells.AsMemory(0, rows)));
    }

    private sealed class Reals(int rows) : ColumnBuffer
    {
        private readonly double?[] _cells = new double?[rows];

        public override void Take(TableBatch batch, int first, int count, int at)
        {
            double[] values = batch.Reals(Column);
            for (int row = 0; row < count; row++)
                _cells[at + row] = double.IsNaN(values[first + row]) ? null : values[first + row];
        }

        public override void Write(ParquetRowGroupWriter group, int rows) =>
            Completed.Wait(group.WriteAsync<double>(Field, _cells.AsMemory(0, rows)));
    }

    private sealed class Truths(int rows) : ColumnBuffer
    {
        private readonly bool[] _cells = new bool[rows];

        public override void Take(TableBatch batch, int first, int count, int at) =>
            Array.Copy(batch.Truths(Column), first, _cells, at, count);

        public override void Write(ParquetRowGroupWriter group, int rows) =>
            Completed.Wait(group.WriteAsync<bool>(Field, _cells.AsMemory(0, rows)));
    }
}
