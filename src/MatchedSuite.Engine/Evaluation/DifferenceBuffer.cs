namespace MatchedSuite.Engine.Evaluation;

/// <summary>What adjustments by sign flips need of the endpoints of one block, while a worker fills it; reused from block to block.</summary>
public sealed class DifferenceBuffer
{
    private double[] _values = [];
    private int _width;
    private int _used;

    /// <summary>The values so far, endpoint after endpoint.</summary>
    public ReadOnlySpan<double> Values => _values.AsSpan(0, _used);

    /// <summary>The row begun last.</summary>
    public Span<double> Row => _values.AsSpan(_used - _width, _width);

    /// <summary>Empties the buffer.</summary>
    public void Clear() => _used = 0;

    /// <summary>Begins the row of the next endpoint: missing everywhere.</summary>
    /// <param name="width">Its length, the same for every endpoint; 0 where nothing is kept.</param>
    public void Begin(int width)
    {
        _width = width;
        if (_used + width > _values.Length)
            Array.Resize(ref _values, Math.Max(_used + width, 2 * _values.Length));
        _used += width;
        Row.Fill(double.NaN);
    }
}
