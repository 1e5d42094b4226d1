using System.Buffers;
using System.Globalization;

namespace MatchedSuite.Storage.Tables;

/// <summary>Writes cells of delimited text: quoted where RFC 4180 asks for it, lines ended by a line feed.</summary>
/// <remarks>Doubles are the shortest text that reads back as the same double; NaN is an empty cell; truth is <c>true</c> or <c>false</c>.</remarks>
public sealed class DelimitedWriter
{
    private readonly TextWriter _writer;
    private readonly char _delimiter;
    private readonly SearchValues<char> _quoted;
    private readonly char[] _number = new char[32];
    private bool _rowBegun;

    /// <summary>Writes to <paramref name="writer"/>, which stays the caller's.</summary>
    public DelimitedWriter(TextWriter writer, char delimiter)
    {
        _writer = writer;
        _delimiter = delimiter;
        _quoted = SearchValues.Create([delimiter, '"', '\r', '\n']);
    }

    /// <summary>Adds a cell of text; null is an empty cell.</summary>
    public void Add(string? text)
    {
        Separate();
        if (text is null) return;
        if (text.AsSpan().IndexOfAny(_quoted) < 0)
        {
            _writer.Write(text);
            return;
        }
        _writer.Write('"');
        _writer.Write(text.Replace("\"", "\"\"", StringComparison.Ordinal));
        _writer.Write('"');
    }

    /// <summary>Adds a whole number.</summary>
    public void Add(int value)
    {
        Separate();
        Write(value);
    }

    /// <summary>Adds a number; NaN is an empty cell.</summary>
    public void Add(double value)
    {
        Separate();
        if (!double.IsNaN(value)) Write(value);
    }

    /// <summary>Adds true or false.</summary>
    public void Add(bool value)
    {
        Separate();
        _writer.Write(value ? "true" : "false");
    }

    /// <summary>Ends the line.</summary>
    public void EndRow()
    {
        _writer.Write('\n');
        _rowBegun = false;
    }

    private void Separate()
    {
        if (_rowBegun) _writer.Write(_delimiter);
        _rowBegun = true;
    }

    private void Write<T>(T value)
        where T : ISpanFormattable
    {
        value.TryFormat(_number, out int length, default, CultureInfo.InvariantCulture);
        _writer.Write(_number, 0, length);
    }
}
