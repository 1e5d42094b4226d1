using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>One block of flips on its way from the least to the most significant endpoint, with the largest w of each flip so far.</summary>
/// <remarks>
/// A flip's largest w is kept as sixteen lanes of which the largest counts. For most tiles a flip lies above all thresholds or below
/// all, which two comparisons show; only a flip between them is followed lane by lane.
/// </remarks>
internal sealed class StepDownBlock
{
    // Flips that are summed and then followed while their sums are still in the first-level cache.
    private const int Strip = 256;
    private const int Row = Lanes.Endpoints;
    private const int Half = Row / 2;

    private readonly Thresholds _thresholds;
    private readonly ISignPatterns _flips;
    private readonly FlipTables _tables;
    private readonly CacheAligned<double> _largest;
    private readonly int[] _laneCounts = new int[Row];

    /// <summary>Room for a block of at most <paramref name="capacity"/> flips.</summary>
    public StepDownBlock(int sets, int capacity, ISignPatterns flips, Thresholds thresholds)
    {
        _thresholds = thresholds;
        _flips = flips;
        _tables = new FlipTables(sets, capacity, Math.Min(Strip, capacity));
        _largest = new CacheAligned<double>(capacity * Row);
    }

    /// <summary>Pairs of a flip and a position that whole-number sums could not decide.</summary>
    public List<(int Flip, int Position)> Undecided { get; } = [];

    /// <summary>Takes the flips <paramref name="first"/>… through all tiles of a panel.</summary>
    /// <param name="panel">The tiles.</param>
    /// <param name="first">First flip of the block.</param>
    /// <param name="maxima">Largest w of each flip of the block before the panel and, on return, after it.</param>
    /// <param name="counts">One count a position, raised by the flips that surely reach its threshold; shared between blocks.</param>
    public void Run(QuantizedPanel panel, int first, Span<double> maxima, int[] counts)
    {
        var largest = _largest.Span;
        _tables.TakeFlips(_flips, first, maxima.Length);
        for (int flip = 0; flip < maxima.Length; flip++)
            largest.Slice(flip * Row, Row).Fill(maxima[flip]);
        for (int tile = 0; tile < panel.Tiles; tile++)
        {
            int position = (panel.FirstTile + tile) * Row;
            int everywhere = 0;
            Array.Clear(_laneCounts);
            _tables.TakeTile(panel.Values(tile));
            for (int strip = 0; strip < maxima.Length; strip += Strip)
            {
                var sums = _tables.Sums(strip, Math.Min(Strip, maxima.Length - strip));
                everywhere += Follow(sums, panel.Scale(tile), largest.Slice(strip * Row, sums.Length), position, first + strip);
            }

            for (int lane = 0; lane < Row; lane++)
                Interlocked.Add(ref counts[position + lane], everywhere + _laneCounts[lane]);
        }

        for (int flip = 0; flip < maxima.Length; flip++)
            maxima[flip] = LargestOf(largest.Slice(flip * Row, Row));
    }

    // Returns how many flips reach every threshold of the tile; those that reach some are counted lane by lane.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private int Follow(ReadOnlySpan<int> sums, in TileScale tileScale, Span<double> largest, int position, int firstFlip)
    {
        var scale = tileScale;
        var all = Vector512.Create(_thresholds.Surely[position + Row - 1]);
        var any = Vector512.Create(_thresholds.Possibly[position]);
        ref int sum = ref MemoryMarshal.GetReference(sums);
        ref double kept = ref MemoryMarshal.GetReference(largest);
        int everywhere = 0;
        for (nuint at = 0; at < (nuint)sums.Length; at += Row)
        {
            var own = Vector512.LoadUnsafe(ref sum, at);
            var lowerBefore = Vector512.LoadUnsafe(ref kept, at);
            var upperBefore = Vector512.LoadUnsafe(ref kept, at + Half);
            var lower = Vector512.MaxNative(lowerBefore, scale.Lower(own));
            var upper = Vector512.MaxNative(upperBefore, scale.Upper(own));
            lower.StoreUnsafe(ref kept, at);
            upper.StoreUnsafe(ref kept, at + Half);
            if (Vector512.GreaterThanOrEqualAny(Vector512.MaxNative(lowerBefore, upperBefore), all))
                everywhere++;
            else if (Vector512.GreaterThanOrEqualAny(Vector512.MaxNative(lower, upper), any))
                FollowLanes(LargestLane(Vector512.MaxNative(lowerBefore, upperBefore)), own, tileScale, position, firstFlip + (int)at / Row);
        }

        return everywhere;
    }

    private void FollowLanes(double largest, Vector512<int> sums, in TileScale scale, int position, int flip)
    {
        Span<double> lanes = stackalloc double[Row];
        scale.Lower(sums).CopyTo(lanes);
        scale.Upper(sums).CopyTo(lanes[Half..]);
        for (int lane = 0; lane < Row; lane++)
        {
            largest = Math.Max(largest, lanes[lane]);
            if (largest >= _thresholds.Surely[position + lane])
                _laneCounts[lane]++;
            else if (largest >= _thresholds.Possibly[position + lane])
                Undecided.Add((flip, position + lane));
        }
    }

    private static double LargestOf(ReadOnlySpan<double> lanes) =>
        LargestLane(Vector512.MaxNative(Vector512.Create(lanes[..Half]), Vector512.Create(lanes[Half..])));

    private static double LargestLane(Vector512<double> lanes)
    {
        var four = Vector256.MaxNative(lanes.GetLower(), lanes.GetUpper());
        return Math.Max(Math.Max(four[0], four[1]), Math.Max(four[2], four[3]));
    }
}
