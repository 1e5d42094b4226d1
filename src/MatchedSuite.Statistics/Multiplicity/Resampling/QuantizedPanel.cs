namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>Consecutive tiles of sixteen endpoints whose differences are whole numbers, so that their signed sums are exact in any order.</summary>
/// <remarks>
/// How differences become whole numbers stands with <see cref="WholeNumbers"/>. The places of the order fill the tiles from the
/// end: a first tile that is not full repeats the least significant endpoint, which changes no maximum.
/// </remarks>
internal sealed class QuantizedPanel
{
    private readonly ScaledEndpoints _endpoints;
    private readonly CacheAligned<int> _values;
    private readonly double[] _factors;
    private readonly double[] _bends;
    private readonly bool[] _isBent;

    /// <summary>Room for as many tiles as the memory allows, at least one.</summary>
    public QuantizedPanel(ScaledEndpoints endpoints)
    {
        _endpoints = endpoints;
        long tile = (long)Lanes.Endpoints * endpoints.Sets * sizeof(int);
        Capacity = (int)Math.Clamp(endpoints.Options.PanelMemory / tile, 1, Math.Min(TilesOf(endpoints), (Array.MaxLength - Lanes.Endpoints) / (tile / sizeof(int))));
        _values = new CacheAligned<int>(Capacity * Lanes.Endpoints * endpoints.Sets);
        _factors = new double[Capacity * Lanes.Endpoints];
        _bends = new double[Capacity * Lanes.Endpoints];
        _isBent = new bool[Capacity];
    }

    /// <summary>Tiles that fit.</summary>
    public int Capacity { get; }

    /// <summary>The first tile of those that are there.</summary>
    public int FirstTile { get; private set; }

    /// <summary>Number of tiles that are there.</summary>
    public int Tiles { get; private set; }

    /// <summary>Tiles that all tested endpoints fill.</summary>
    public static int TilesOf(ScaledEndpoints endpoints) => (endpoints.Count + Lanes.Endpoints - 1) / Lanes.Endpoints;

    /// <summary>Lanes of the first tile that repeat its least significant endpoint.</summary>
    public static int PaddingOf(ScaledEndpoints endpoints) => TilesOf(endpoints) * Lanes.Endpoints - endpoints.Count;

    /// <summary>Reads tiles from <paramref name="firstTile"/> on, as many as fit, unless they are there already.</summary>
    public void Load(int firstTile, CancellationToken cancellation)
    {
        if (Tiles > 0 && FirstTile == firstTile)
            return;
        FirstTile = firstTile;
        Tiles = Math.Min(Capacity, TilesOf(_endpoints) - firstTile);
        var parallel = new ParallelOptions { MaxDegreeOfParallelism = _endpoints.Options.Threads, CancellationToken = cancellation };
        Parallel.For(0, Tiles, parallel, () => new double[_endpoints.Sets], (tile, _, differences) =>
        {
            _isBent[tile] = false;
            for (int lane = 0; lane < Lanes.Endpoints; lane++)
                Quantize(tile, lane, differences);
            return differences;
        }, _ => { });
    }

    /// <summary>Whole-number differences of one tile of this panel: sixteen lanes a set.</summary>
    public ReadOnlySpan<int> Values(int tile) =>
        _values.Span.Slice(tile * Lanes.Endpoints * _endpoints.Sets, Lanes.Endpoints * _endpoints.Sets);

    /// <summary>What makes the sums of one tile comparable.</summary>
    public TileScale Scale(int tile)
    {
        int at = tile * Lanes.Endpoints;
        return new TileScale(_factors.AsSpan(at, Lanes.Endpoints), _bends.AsSpan(at, Lanes.Endpoints), _isBent[tile], _endpoints.Options.Sides);
    }

    private void Quantize(int tile, int lane, Span<double> differences)
    {
        int place = Math.Max(0, (FirstTile + tile) * Lanes.Endpoints + lane - PaddingOf(_endpoints));
        _endpoints.Read(place, differences);
        ref readonly var scale = ref _endpoints.ScaleAt(place);
        var values = _values.Span.Slice(tile * Lanes.Endpoints * _endpoints.Sets, Lanes.Endpoints * _endpoints.Sets);
        for (int i = 0, at = lane; i < differences.Length; i++, at += Lanes.Endpoints)
            values[at] = (int)Math.Round(differences[i] * scale.Multiplier);
        _factors[tile * Lanes.Endpoints + lane] = scale.Factor / scale.Multiplier;
        _bends[tile * Lanes.Endpoints + lane] = scale.Bend;
        _isBent[tile] |= scale.Bend != 0;
    }
}
