using System.Text;

namespace MatchedSuite.Storage.Tables;

/// <summary>Writes a table as delimited text: comma, line feed, UTF-8 without byte order mark.</summary>
/// <remarks>
/// Cells as <see cref="DelimitedWriter"/> writes them. The same rows give the same bytes, in whatever batches they come.
/// </remarks>
public sealed class CsvTableSink : ITableSink
{
    private const int BufferCharacters = 1 << 15;

    private readonly WrittenFile _file;
    private readonly StreamWriter _writer;
    private readonly IReadOnlyList<TableColumn> _schema;
    private readonly DelimitedWriter _cells;

    /// <summary>Begins the file, replacing one of that name, with the header.</summary>
    /// <exception cref="IOException">The file cannot be written; the message names it.</exception>
    public CsvTableSink(string path, IReadOnlyList<TableColumn> schema)
    {
        ArgumentNullException.ThrowIfNull(schema);
        _schema = schema;
        _file = new WrittenFile(path);
        _writer = new StreamWriter(_file.Stream, new UTF8Encoding(false), BufferCharacters, leaveOpen: true) { NewLine = "\n" };
        _cells = new DelimitedWriter(_writer, ',');
        _file.Guarded(WriteHeader);
    }

    /// <inheritdoc/>
    /// <exception cref="IOException">The disk is full; the message names the file.</exception>
    public void Write(TableBatch batch)
    {
        ArgumentNullException.ThrowIfNull(batch);
        _file.Guarded(() =>
        {
            for (int row = 0; row < batch.Rows; row++) WriteRow(batch, row);
        });
    }

    /// <inheritdoc/>
    public void Complete()
    {
        _file.Guarded(_writer.Flush);
        _file.Complete();
    }

    /// <inheritdoc/>
    public void Dispose() => _file.Dispose();

    private void WriteHeader()
    {
        foreach (TableColumn column in _schema) _cells.Add(column.Name);
        _cells.EndRow();
    }

    private void WriteRow(TableBatch batch, int row)
    {
        for (int column = 0; column < _schema.Count; column++)
        {
            switch (_schema[column].Type)
            {
                case ColumnType.Text: _cells.Add(batch.Text(column)[row]); break;
                case ColumnType.Integer: _cells.Add(batch.Integers(column)[row]); break;
                case ColumnType.Real: _cells.Add(batch.Reals(column)[row]); break;
                default: _cells.Add(batch.Truths(column)[row]); break;
            }
        }
        _cells.EndRow();
    }
}
