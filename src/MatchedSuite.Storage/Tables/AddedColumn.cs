namespace MatchedSuite.Storage.Tables;

/// <summary>A column that is put behind the columns of a copied table.</summary>
public sealed class AddedColumn
{
    private readonly double[] _reals = [];
    private readonly bool[] _truths = [];
    private readonly Func<int, string> _text;

    /// <summary>A column of numbers; NaN is no number.</summary>
    /// <param name="name">Name of the column.</param>
    /// <param name="values">One number a row.</param>
    /// <param name="text">How a row's number is written as text, where a double may hold less than the text can say.</param>
    public AddedColumn(string name, double[] values, Func<int, string> text)
    {
        Column = new TableColumn(name, ColumnType.Real);
        _reals = values;
        _text = text;
    }

    /// <summary>A column of true and false.</summary>
    public AddedColumn(string name, bool[] values)
    {
        Column = new TableColumn(name, ColumnType.Truth);
        _truths = values;
        _text = row => values[row] ? "true" : "false";
    }

    /// <summary>Name and type.</summary>
    public TableColumn Column { get; }

    /// <summary>A row's cell as text; empty for no number.</summary>
    public string Text(int row) => _text(row);

    internal ReadOnlySpan<double> Reals => _reals;

    internal ReadOnlySpan<bool> Truths => _truths;
}
