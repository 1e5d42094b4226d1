using System.Runtime.Intrinsics;

namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>Consecutive tiles of sixteen endpoints whose differences are whole numbers, so that their signed sums are exact in any order.</summary>
/// <remarks>
/// Each endpoint's differences are multiplied by a power of two that keeps Σ|d| below 2^31 and are then rounded; whole numbers such
/// as ranks are thus kept as they are. The places of the order fill the tiles from the end: a first tile that is not full repeats
/// the least significant endpoint, which changes no maximum.
/// </remarks>
internal sealed class QuantizedPanel
{
    // Rounding adds at most half a unit a set.
    private const double LargestSum = int.MaxValue;

    private readonly ScaledEndpoints _endpoints;
    private readonly int[] _values;
    private readonly float[] _factors;
    private readonly float[] _bends;
    private readonly bool[] _isBent;

    /// <summary>Room for as many tiles as the memory allows, at least one.</summary>
    public QuantizedPanel(ScaledEndpoints endpoints)
    {
        _endpoints = endpoints;
        long tile = (long)Lanes.Endpoints * endpoints.Sets * sizeof(int);
        Capacity = (int)Math.Clamp(endpoints.Options.PanelMemory / tile, 1, Math.Min(TilesOf(endpoints), Array.MaxLength / (tile / sizeof(int))));
        _values = new int[Capacity * Lanes.Endpoints * endpoints.Sets];
        _factors = new float[Capacity * Lanes.Endpoints];
        _bends = new float[Capacity * Lanes.Endpoints];
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

    /// <summary>How far the w-scale's square root may be off by rounding to whole numbers, for the worst endpoint.</summary>
    public static double LargestRounding(ScaledEndpoints endpoints)
    {
        double largest = 0;
        for (int place = 0; place < endpoints.Count; place++)
        {
            ref readonly var scale = ref endpoints.ScaleAt(place);
            largest = Math.Max(largest, 0.5 * scale.Sets / Multiplier(scale, endpoints.Sets) * scale.Factor);
        }

        return largest;
    }

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
        _values.AsSpan(tile * Lanes.Endpoints * _endpoints.Sets, Lanes.Endpoints * _endpoints.Sets);

    /// <summary>w of sixteen sums of one tile, in single precision.</summary>
    public TileScale Scale(int tile)
    {
        int at = tile * Lanes.Endpoints;
        var bends = Vector512.Create(_bends.AsSpan(at, Lanes.Endpoints));
        return new TileScale(Vector512.Create(_factors.AsSpan(at, Lanes.Endpoints)), bends, _isBent[tile], _endpoints.Options.Sides);
    }

    private void Quantize(int tile, int lane, Span<double> differences)
    {
        int place = Math.Max(0, (FirstTile + tile) * Lanes.Endpoints + lane - PaddingOf(_endpoints));
        _endpoints.Read(place, differences);
        ref readonly var scale = ref _endpoints.ScaleAt(place);
        double multiplier = Multiplier(scale, _endpoints.Sets);
        var values = _values.AsSpan(tile * Lanes.Endpoints * _endpoints.Sets, Lanes.Endpoints * _endpoints.Sets);
        for (int i = 0, at = lane; i < differences.Length; i++, at += Lanes.Endpoints)
            values[at] = (int)Math.Round(differences[i] * multiplier);
        _factors[tile * Lanes.Endpoints + lane] = (float)(scale.Factor / multiplier);
        _bends[tile * Lanes.Endpoints + lane] = (float)scale.Bend;
        _isBent[tile] |= scale.Bend != 0;
    }

    private static double Multiplier(in EndpointScale scale, int sets) =>
        Math.ScaleB(1, Math.ILogB((LargestSum - sets) / scale.Magnitude));
}
