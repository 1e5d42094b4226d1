namespace MatchedSuite.Storage.Values;

/// <summary>The unit of work of a run: some endpoints on all wanted samples, endpoint-major, NaN where missing.</summary>
/// <remarks>One worker owns a block and loads it again and again; its arrays grow and are reused.</remarks>
public sealed class EndpointBlock
{
    private double[] _values = [];

    /// <summary>Names of the endpoints, in file order; the first <see cref="Count"/> are valid.</summary>
    public List<string> Names { get; } = [];

    /// <summary>Number of endpoints loaded.</summary>
    public int Count => Names.Count;

    /// <summary>Number of samples an endpoint: the wanted samples, in the order in which they were asked for.</summary>
    public int Samples { get; private set; }

    /// <summary>Empties the block for a new load.</summary>
    public void Clear(int samples)
    {
        Names.Clear();
        Samples = samples;
    }

    /// <summary>Adds an endpoint and hands out its values, to be written by the loader.</summary>
    public Span<double> Add(string name)
    {
        int start = Names.Count * Samples;
        if (start + Samples > _values.Length)
            Array.Resize(ref _values, Math.Max(start + Samples, 2 * _values.Length));
        Names.Add(name);
        return _values.AsSpan(start, Samples);
    }

    /// <summary>Takes the last added endpoint away again.</summary>
    public void RemoveLast() => Names.RemoveAt(Names.Count - 1);

    /// <summary>The values of one endpoint, one for each wanted sample.</summary>
    public Span<double> Values(int endpoint) => _values.AsSpan(endpoint * Samples, Samples);
}
