namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>The endpoints of a store with their scales, ordered from the least to the most significant.</summary>
internal sealed class ScaledEndpoints
{
    private readonly IDifferenceStore _store;
    private readonly EndpointScale[] _scales;
    private readonly int[] _order;

    /// <summary>Reads every endpoint once.</summary>
    public ScaledEndpoints(IDifferenceStore store, ISignPatterns patterns, ResamplingOptions options, CancellationToken cancellation)
    {
        _store = store;
        Options = options;
        _scales = new EndpointScale[store.Endpoints];
        var parallel = new ParallelOptions { MaxDegreeOfParallelism = options.Threads, CancellationToken = cancellation };
        Parallel.For(0, _scales.Length, parallel, () => new double[store.Sets], (endpoint, _, differences) =>
        {
            store.Read(endpoint, 1, differences);
            _scales[endpoint] = EndpointScale.Of(differences, options, patterns);
            return differences;
        }, _ => { });
        _order = [.. Enumerable.Range(0, _scales.Length).Where(endpoint => _scales[endpoint].IsTested)];
        double[] observed = Array.ConvertAll(_order, endpoint => _scales[endpoint].Observed);
        Array.Sort(observed, _order);
    }

    /// <summary>What is compared, in which direction, and by how many threads.</summary>
    public ResamplingOptions Options { get; }

    /// <summary>Number of sets.</summary>
    public int Sets => _store.Sets;

    /// <summary>Number of all endpoints, tested or not.</summary>
    public int All => _scales.Length;

    /// <summary>Number of tested endpoints: the places of the order.</summary>
    public int Count => _order.Length;

    /// <summary>The endpoint at a place, 0 the least significant.</summary>
    public int EndpointAt(int place) => _order[place];

    /// <summary>The scale of the endpoint at a place.</summary>
    public ref readonly EndpointScale ScaleAt(int place) => ref _scales[_order[place]];

    /// <summary>Reads the endpoint at a place: times its power of two, in the direction of the alternative, 0 where missing.</summary>
    public void Read(int place, Span<double> differences)
    {
        int endpoint = _order[place];
        _store.Read(endpoint, 1, differences);
        double power = Options.Sides == Sides.Less ? -_scales[endpoint].Power : _scales[endpoint].Power;
        for (int i = 0; i < differences.Length; i++)
            differences[i] = double.IsNaN(differences[i]) ? 0 : differences[i] * power;
    }

    /// <summary>w of one flip at a place, in double precision: the definition that every faster way must agree with.</summary>
    /// <param name="place">The place.</param>
    /// <param name="flip">One bit a set.</param>
    /// <param name="differences">Working memory for one endpoint.</param>
    public double Comparable(int place, ReadOnlySpan<ulong> flip, Span<double> differences)
    {
        Read(place, differences);
        double sum = 0;
        for (int i = 0; i < differences.Length; i++)
            sum += (flip[i >> 6] >> i & 1) == 0 ? differences[i] : -differences[i];
        return ScaleAt(place).Comparable(sum, Options.Sides);
    }
}
