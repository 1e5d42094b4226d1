using System.Buffers;
using MatchedSuite.Storage.Columnar;
using MatchedSuite.Storage.Files;

namespace MatchedSuite.Storage.Values;

/// <summary>Parquet with one row an endpoint: row group by row group through a spool, since its columns are samples.</summary>
internal sealed class ParquetEndpointRows : EndpointSource
{
    private readonly EndpointSourceOptions _options;
    private readonly ParquetTable _table;
    private readonly int _endpointColumn;
    private readonly int[] _sampleColumns;

    public ParquetEndpointRows(EndpointSourceOptions options)
    {
        _options = options;
        _table = ParquetTable.Open(options.Path);
        try
        {
            string where = InputFile.ShortName(options.Path);
            _endpointColumn = options.EndpointColumn is { } name ? ColumnNames.Find(where, _table.Names, name) : 0;
            _sampleColumns = SampleColumns.Of(where, _table.Names, _endpointColumn, options.OtherColumns);
            Samples = [.. _sampleColumns.Select(column => _table.Names[column])];
            _table.RequireRows();
        }
        catch
        {
            _table.Dispose();
            throw;
        }
    }

    public override IReadOnlyList<string> Samples { get; }

    public override IEnumerable<PendingBlock> Blocks(EndpointSelection selection)
    {
        SamplePlaces.Of(selection, Samples.Count);
        foreach (int sample in selection.Samples) ParquetNumbers.Require(_table, _sampleColumns[sample]);
        return ByRowGroup(selection);
    }

    public override void Dispose() => _table.Dispose();

    private IEnumerable<PendingBlock> ByRowGroup(EndpointSelection selection)
    {
        int number = 0;
        long before = 0;
        for (int group = 0; group < _table.RowsOfGroup.Count; group++)
        {
            int rows = _table.RowsOfGroup[group];
            string[] names = Names(group, before);
            int[] kept = [.. Enumerable.Range(0, rows).Where(row => selection.Wanted(names[row]))];
            if (kept.Length > 0)
            {
                // Blocks of the last row group may be pending while the next one fills its spool: half for each.
                using var spool = new SampleMajorSpool(selection.Samples.Length, kept.Length, _options.Memory / 2, _options.ScratchFolder);
                Fill(spool, selection, group, names, kept);
                string[] keptNames = [.. kept.Select(row => names[row])];
                foreach (PendingBlock block in spool.Blocks(keptNames, selection.EndpointsPerBlock, number,
                    (double)before / _table.Rows, (double)rows / _table.Rows))
                {
                    number = block.Number + 1;
                    yield return block;
                }
            }
            before += rows;
        }
    }

    private string[] Names(int group, long before)
    {
        string?[] names = ParquetTexts.Read(_table, group, _endpointColumn);
        int unnamed = Array.FindIndex(names, string.IsNullOrEmpty);
        if (unnamed >= 0)
            throw new RefusalException($"{InputFile.ShortName(_table.Path)}, row {before + unnamed + 1}", "the endpoint has no name",
                $"a name in column '{_table.Names[_endpointColumn]}'", "Name the endpoint, or remove the row.");
        return names!;
    }

    private void Fill(SampleMajorSpool spool, EndpointSelection selection, int group, string[] names, int[] kept)
    {
        double[] column = ArrayPool<double>.Shared.Rent(names.Length);
        for (int place = 0; place < selection.Samples.Length; place++)
        {
            int sample = selection.Samples[place];
            ParquetNumbers.Read(_table, group, _sampleColumns[sample], column);
            for (int i = 0; i < kept.Length; i++)
            {
                double value = column[kept[i]];
                if (double.IsInfinity(value)) throw InfiniteValue.Refusal(_table.Path, names[kept[i]], Samples[sample]);
                column[i] = value;
            }
            spool.Write(place, 0, column.AsSpan(0, kept.Length));
        }
        ArrayPool<double>.Shared.Return(column);
    }
}
