using System.Buffers;
using System.Collections.Concurrent;
using System.Runtime.ExceptionServices;
using MatchedSuite.Storage.Files;
using MatchedSuite.Storage.Text;

namespace MatchedSuite.Storage.Values;

/// <summary>Delimited text with one row a sample: read once into a spool, from which blocks of endpoints are cut.</summary>
internal sealed class DelimitedSampleRows : EndpointSource
{
    private const int ChunkBytes = 1 << 20;

    private readonly EndpointSourceOptions _options;
    private readonly DelimitedText _text;
    private readonly int[] _endpointColumns;
    private readonly CellNumbers _numbers;
    private readonly string[] _samples;
    private EndpointSelection? _spooled;
    private SampleMajorSpool? _spool;
    private string[] _endpoints = [];

    public DelimitedSampleRows(EndpointSourceOptions options)
    {
        _options = options;
        _text = DelimitedText.Open(options.Path, options.Dialect);
        string where = InputFile.ShortName(options.Path);
        if (options.SampleColumn is { } key) ColumnNames.Find(where, _text.Columns, key);
        _endpointColumns = EndpointColumns.Of(where, _text.Columns, options.SampleColumn, options.OtherColumns);
        _numbers = new CellNumbers(options.Dialect);
        _samples = options.SampleColumn is { } column
            ? SampleKeys.Of(DelimitedTextTable.Read(options.Path, options.Dialect, name => name == column), column)
            : SampleKeys.Numbered(CountRows());
    }

    public override IReadOnlyList<string> Samples => _samples;

    public override IEnumerable<PendingBlock> Blocks(EndpointSelection selection)
    {
        int[] places = SamplePlaces.Of(selection, _samples.Length);
        return Reordered(selection, places);
    }

    public override void Dispose() => Forget();

    private int CountRows()
    {
        int rows = 0;
        foreach (TextChunk chunk in _text.Chunks(int.MaxValue, ChunkBytes))
        {
            rows += chunk.Records;
            chunk.Release();
        }
        return rows;
    }

    private IEnumerable<PendingBlock> Reordered(EndpointSelection selection, int[] places)
    {
        // A run that passes over the values again, with other blocks, finds them reordered already.
        bool same = _spooled is not null && _spooled.Wanted == selection.Wanted && _spooled.Samples.AsSpan().SequenceEqual(selection.Samples);
        if (!same)
        {
            Forget();
            Spool(selection, places);
        }
        return _endpoints.Length == 0 ? [] : _spool!.Blocks(_endpoints, selection.EndpointsPerBlock, 0, 0, 1);
    }

    private void Forget()
    {
        _spool?.Dispose();
        _spool = null;
        _spooled = null;
    }

    private void Spool(EndpointSelection selection, int[] places)
    {
        int[] endpointOfColumn = new int[_text.Columns.Length];
        Array.Fill(endpointOfColumn, -1);
        var endpoints = new List<string>();
        foreach (int column in _endpointColumns)
        {
            if (!selection.Wanted(_text.Columns[column])) continue;
            endpointOfColumn[column] = endpoints.Count;
            endpoints.Add(_text.Columns[column]);
        }
        _endpoints = [.. endpoints];
        _spool = new SampleMajorSpool(selection.Samples.Length, _endpoints.Length, _options.Memory, _options.ScratchFolder);
        long rows = 0;
        ReadAll(chunk =>
        {
            Read(chunk, places, endpointOfColumn);
            Interlocked.Add(ref rows, chunk.Records);
        });
        if (rows != _samples.Length) throw Changed();
        _spooled = selection;
    }

    // Chunks are handed out in file order and those begun are finished, so the first refusal of the file is always among
    // those collected: the message does not depend on the number of threads.
    private void ReadAll(Action<TextChunk> read)
    {
        var refusals = new ConcurrentDictionary<long, RefusalException>();
        try
        {
            Parallel.ForEach(
                Partitioner.Create(_text.Chunks(int.MaxValue, ChunkBytes), EnumerablePartitionerOptions.NoBuffering),
                new ParallelOptions { MaxDegreeOfParallelism = Math.Max(1, _options.Threads) },
                (chunk, loop) =>
                {
                    try
                    {
                        read(chunk);
                    }
                    catch (RefusalException refusal)
                    {
                        refusals[chunk.FirstRecord] = refusal;
                        loop.Stop();
                    }
                    finally
                    {
                        chunk.Release();
                    }
                });
        }
        catch (AggregateException several) when (refusals.IsEmpty)
        {
            ExceptionDispatchInfo.Throw(several.InnerExceptions[0]);
        }
        catch (AggregateException)
        {
            // The end of the file is broken too; what stands before it is told first.
        }
        if (!refusals.IsEmpty) throw refusals.MinBy(refusal => refusal.Key).Value;
    }

    private void Read(TextChunk chunk, int[] places, int[] endpointOfColumn)
    {
        double[] values = ArrayPool<double>.Shared.Rent(Math.Max(1, _endpoints.Length));
        using var reader = new ChunkReader(_text, chunk);
        // Record 0 is the header.
        for (long sample = chunk.FirstRecord - 1; reader.MoveNext(); sample += reader.EndsRecord ? 1 : 0)
        {
            if (reader.EndsRecord) _text.RequireWidth(reader.FirstColumn + reader.Cells, reader.Line);
            if (sample >= places.Length) throw Changed();
            int place = places[sample];
            if (place < 0) continue;
            int cells = Math.Min(reader.Cells, endpointOfColumn.Length - reader.FirstColumn);
            for (int cell = 0; cell < cells; cell++)
            {
                int column = reader.FirstColumn + cell;
                int endpoint = endpointOfColumn[column];
                if (endpoint < 0) continue;
                ReadOnlySpan<char> text = reader[cell];
                if (!_numbers.TryRead(text, out values[endpoint]))
                    throw _numbers.Refusal($"{_text.Place(reader.Line)}, endpoint '{_text.Columns[column]}', sample '{_samples[sample]}'", text);
            }
            if (reader.EndsRecord) _spool!.Write(place, 0, values.AsSpan(0, _endpoints.Length));
        }
        ArrayPool<double>.Shared.Return(values);
    }

    private RefusalException Changed() =>
        new(InputFile.ShortName(_options.Path), "the file has changed while it was read", "a file that stays as it is",
            "Wait until it is whole, then run again.");
}
