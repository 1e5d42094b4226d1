using System.Globalization;
using System.Text;

namespace MatchedSuite.Storage.Tables;

/// <summary>Writes a table as delimited text: comma, line feed, UTF-8 without byte order mark.</summary>
/// <remarks>
/// Doubles are the shortest text that reads back as the same double; NaN is an empty cell; truth is <c>true</c> or
/// <c>false</c>. Cells are quoted where RFC 4180 asks for it. The same rows give the same bytes, in whatever batches they come.
/// </remarks>
public sealed class CsvTableSink : ITableSink
{
    private const int BufferCharacters = 1 << 15;

    private readonly WrittenFile _file;
    private readonly StreamWriter _writer;
    private readonly IReadOnlyList<TableColumn> _schema;
    private readonly char[] _number = new char[32];

    /// <summary>Begins the file, replacing one of that name, with the header.</summary>
    /// <exception cref="IOException">The file cannot be written; the message names it.</exception>
    public CsvTableSink(string path, IReadOnlyList<TableColumn> schema)
    {
        ArgumentNullException.ThrowIfNull(schema);
        _schema = schema;
        _file = new WrittenFile(path);
        _writer = new StreamWriter(_file.Stream, new UTF8Encoding(false), BufferCharacters, leaveOpen: true) { NewLine = "\n" };
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
        for (int column = 0; column < _schema.Count; column++)
        {
            if (column > 0) _writer.Write(',');
            WriteText(_schema[column].Name);
        }
        _writer.Write('\n');
    }

    private void WriteRow(TableBatch batch, int row)
    {
        for (int column = 0; column < _schema.Count; column++)
        {
            if (column > 0) _writer.Write(',');
            switch (_schema[column].Type)
            {
                case ColumnType.Text: WriteText(batch.Text(column)[row]); break;
                case ColumnType.Integer: WriteNumber(batch.Integers(column)[row]); break;
                case ColumnType.Real: WriteReal(batch.Reals(column)[row]); break;
                default: _writer.Write(batch.Truths(column)[row] ? "true" : "false"); break;
            }
        }
        _writer.Write('\n');
    }

    private void WriteReal(double value)
    {
        if (!double.IsNaN(value)) WriteNumber(value);
    }

    private void WriteNumber<T>(T value)
        where T : ISpanFormattable
    {
        value.TryFormat(_number, out int length, default, CultureInfo.InvariantCulture);
        _writer.Write(_number, 0, length);
    }

    private void WriteText(string? text)
    {
        if (text is null) return;
        if (text.AsSpan().IndexOfAny(",\"\r\n") < 0)
        {
            _writer.Write(text);
            return;
        }
        _writer.Write('"');
        _writer.Write(text.Replace("\"", "\"\"", StringComparison.Ordinal));
        _writer.Write('"');
    }
}
