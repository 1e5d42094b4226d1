using MatchedSuite.Storage.Files;
using MatchedSuite.Storage.Text;

namespace MatchedSuite.Storage.Values;

/// <summary>Delimited text with one row an endpoint: cut into chunks by the enumerating thread, parsed by the loading ones.</summary>
internal sealed class DelimitedEndpointRows : EndpointSource
{
    // Large enough that starting the parser costs nothing beside the parsing, small enough for the second-level cache.
    private const int ChunkBytes = 1 << 19;

    private readonly DelimitedText _text;
    private readonly int _endpointColumn;
    private readonly int[] _sampleColumns;
    private readonly CellNumbers _numbers;

    public DelimitedEndpointRows(EndpointSourceOptions options)
    {
        _text = DelimitedText.Open(options.Path, options.Dialect);
        string where = InputFile.ShortName(options.Path);
        _endpointColumn = options.EndpointColumn is { } name ? ColumnNames.Find(where, _text.Columns, name) : 0;
        _sampleColumns = SampleColumns.Of(where, _text.Columns, _endpointColumn, options.OtherColumns);
        _numbers = new CellNumbers(options.Dialect);
        Samples = [.. _sampleColumns.Select(column => _text.Columns[column])];
        _text.RequireRows();
    }

    public override IReadOnlyList<string> Samples { get; }

    public override IEnumerable<PendingBlock> Blocks(EndpointSelection selection)
    {
        int[] places = SamplePlaces.Of(selection, Samples.Count);
        int[] placeOfColumn = new int[_text.Columns.Length];
        Array.Fill(placeOfColumn, -1);
        for (int sample = 0; sample < places.Length; sample++) placeOfColumn[_sampleColumns[sample]] = places[sample];
        return Cut(selection, placeOfColumn);
    }

    public override void Dispose()
    {
    }

    private IEnumerable<PendingBlock> Cut(EndpointSelection selection, int[] placeOfColumn)
    {
        int number = 0;
        foreach (TextChunk chunk in _text.Chunks(selection.EndpointsPerBlock, ChunkBytes))
            yield return new Block(this, selection, placeOfColumn, chunk) { Number = number++, Reached = chunk.Reached };
    }

    private sealed class Block(DelimitedEndpointRows source, EndpointSelection selection, int[] placeOfColumn, TextChunk chunk) : PendingBlock
    {
        public override void Load(EndpointBlock target)
        {
            target.Clear(selection.Samples.Length);
            using (var reader = new ChunkReader(source._text, chunk))
                while (reader.MoveNext()) Read(reader, target);
            chunk.Release();
        }

        private void Read(ChunkReader reader, EndpointBlock target)
        {
            source.RequireWholeRow(reader);
            ReadOnlySpan<char> name = reader[source._endpointColumn];
            if (name.IsEmpty)
                throw new RefusalException(source._text.Place(reader.Line), "the endpoint has no name", "a name in the first column asked for",
                    "Name the endpoint, or remove the line.");
            string endpoint = name.ToString();
            if (!selection.Wanted(endpoint)) return;
            Span<double> values = target.Add(endpoint);
            int[] places = placeOfColumn;
            for (int column = 0; column < places.Length; column++)
            {
                int place = places[column];
                if (place < 0) continue;
                ReadOnlySpan<char> cell = reader[column];
                if (!source._numbers.TryRead(cell, out values[place]))
                    throw source._numbers.Refusal(source.Place(reader.Line, endpoint, column), cell);
            }
        }
    }

    private string Place(long line, string endpoint, int column) =>
        $"{_text.Place(line)}, endpoint '{endpoint}', sample '{_text.Columns[column]}'";

    private void RequireWholeRow(ChunkReader reader)
    {
        if (reader.EndsRecord && reader.FirstColumn == 0)
            _text.RequireWidth(reader.Cells, reader.Line);
        else
            throw new RefusalException(_text.Place(reader.Line), "the line is longer than 4 million characters", "shorter lines in the layout endpoint-rows",
                "Keep so many samples with one row a sample, or as Parquet.");
    }
}
