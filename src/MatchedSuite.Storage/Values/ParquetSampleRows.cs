using System.Buffers;
using System.Collections.Concurrent;
using MatchedSuite.Storage.Columnar;
using MatchedSuite.Storage.Files;

namespace MatchedSuite.Storage.Values;

/// <summary>Parquet with one row a sample: each column is an endpoint already, read by the loading thread with a reader of its own.</summary>
internal sealed class ParquetSampleRows : EndpointSource
{
    private readonly string _path;
    private readonly IReadOnlyList<string> _names;
    private readonly int[] _endpointColumns;
    private readonly string[] _samples;
    private readonly ConcurrentBag<ParquetTable> _idle = [];

    public ParquetSampleRows(EndpointSourceOptions options)
    {
        _path = options.Path;
        string where = InputFile.ShortName(options.Path);
        ParquetTable table = ParquetTable.Open(options.Path);
        try
        {
            _names = table.Names;
            table.RequireRows();
            if (options.SampleColumn is { } key) ColumnNames.Find(where, _names, key);
            _endpointColumns = EndpointColumns.Of(where, _names, options.SampleColumn, options.OtherColumns);
            _samples = options.SampleColumn is { } column
                ? SampleKeys.Of(ParquetTextTable.Read(options.Path, options.Dialect, name => name == column), column)
                : SampleKeys.Numbered(checked((int)table.Rows));
            _idle.Add(table);
        }
        catch
        {
            table.Dispose();
            throw;
        }
    }

    public override IReadOnlyList<string> Samples => _samples;

    public override IEnumerable<PendingBlock> Blocks(EndpointSelection selection)
    {
        int[] places = SamplePlaces.Of(selection, _samples.Length);
        int[] wanted = [.. _endpointColumns.Where(column => selection.Wanted(_names[column]))];
        ParquetTable table = Rent();
        try
        {
            foreach (int column in wanted) ParquetNumbers.Require(table, column);
        }
        finally
        {
            _idle.Add(table);
        }
        return Cut(selection, places, wanted);
    }

    public override void Dispose()
    {
        while (_idle.TryTake(out ParquetTable? table)) table.Dispose();
    }

    private IEnumerable<PendingBlock> Cut(EndpointSelection selection, int[] places, int[] wanted)
    {
        int number = 0;
        for (int first = 0; first < wanted.Length; first += selection.EndpointsPerBlock)
        {
            int[] columns = wanted[first..Math.Min(first + selection.EndpointsPerBlock, wanted.Length)];
            yield return new Block(this, selection, places, columns) { Number = number++, Reached = (double)(first + columns.Length) / wanted.Length };
        }
    }

    private ParquetTable Rent() => _idle.TryTake(out ParquetTable? table) ? table : ParquetTable.Open(_path);

    private void Read(ParquetTable table, int column, int[] places, double[] buffer, Span<double> values)
    {
        int sample = 0;
        for (int group = 0; group < table.RowsOfGroup.Count; group++)
        {
            ParquetNumbers.Read(table, group, column, buffer);
            for (int row = 0; row < table.RowsOfGroup[group]; row++, sample++)
            {
                int place = places[sample];
                if (place < 0) continue;
                if (double.IsInfinity(buffer[row])) throw InfiniteValue.Refusal(_path, _names[column], _samples[sample]);
                values[place] = buffer[row];
            }
        }
    }

    private sealed class Block(ParquetSampleRows source, EndpointSelection selection, int[] places, int[] columns) : PendingBlock
    {
        public override void Load(EndpointBlock target)
        {
            target.Clear(selection.Samples.Length);
            ParquetTable table = source.Rent();
            double[] buffer = ArrayPool<double>.Shared.Rent(table.RowsOfGroup.Max());
            try
            {
                foreach (int column in columns)
                    source.Read(table, column, places, buffer, target.Add(source._names[column]));
            }
            finally
            {
                ArrayPool<double>.Shared.Return(buffer);
                source._idle.Add(table);
            }
        }
    }
}
