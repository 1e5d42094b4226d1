using MatchedSuite.Storage.Tables;

namespace MatchedSuite.Storage.Text;

/// <summary>Reads a <see cref="TextTable"/> from delimited text.</summary>
internal static class DelimitedTextTable
{
    private const int ChunkBytes = 1 << 20;

    // Link and role columns repeat few texts; one string for all equal cells of a column keeps large sheets small.
    private const int TextsRemembered = 1 << 12;

    public static TextTable Read(string path, TextDialect dialect, Func<string, bool> wanted)
    {
        DelimitedText text = DelimitedText.Open(path, dialect);
        var missing = new MissingTokens(dialect.Missing);
        var names = new List<string>();
        var columns = new List<Column>();
        var columnOf = new Column?[text.Columns.Length];
        for (int c = 0; c < columnOf.Length; c++)
        {
            if (text.Columns[c].Length == 0 || !wanted(text.Columns[c])) continue;
            names.Add(text.Columns[c]);
            columns.Add(columnOf[c] = new Column());
        }
        var lines = new List<long>();
        foreach (TextChunk chunk in text.Chunks(int.MaxValue, ChunkBytes))
        {
            using var reader = new ChunkReader(text, chunk);
            while (reader.MoveNext())
            {
                if (reader.EndsRecord) text.RequireWidth(reader.FirstColumn + reader.Cells, reader.Line);
                int cells = Math.Min(reader.Cells, columnOf.Length - reader.FirstColumn);
                for (int cell = 0; cell < cells; cell++)
                    columnOf[reader.FirstColumn + cell]?.Add(reader[cell], missing);
                if (reader.EndsRecord) lines.Add(reader.Line);
            }
            chunk.Release();
        }
        return new TextTable(path, names, [.. columns.Select(column => column.Cells.ToArray())], lines.Count, [.. lines]);
    }

    private sealed class Column
    {
        private readonly HashSet<string> _texts = new(StringComparer.Ordinal);

        public List<string?> Cells { get; } = [];

        public void Add(ReadOnlySpan<char> cell, MissingTokens missing) =>
            Cells.Add(missing.Contains(cell) ? null : Remembered(cell));

        private string Remembered(ReadOnlySpan<char> cell)
        {
            var lookup = _texts.GetAlternateLookup<ReadOnlySpan<char>>();
            if (lookup.TryGetValue(cell, out string? known)) return known;
            string text = cell.ToString();
            if (_texts.Count < TextsRemembered) _texts.Add(text);
            return text;
        }
    }
}
