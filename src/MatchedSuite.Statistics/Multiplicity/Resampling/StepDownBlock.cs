using System.Runtime.Intrinsics;

namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>One block of flips on its way from the least to the most significant endpoint, with the largest w of each flip so far.</summary>
/// <remarks>
/// A flip's largest w is kept as sixteen lanes of which the largest counts. For most tiles a flip lies above all thresholds or below
/// all, which two comparisons show; only a flip between them is followed lane by lane.
/// </remarks>
internal sealed class StepDownBlock
{
    private const int Row = Lanes.Endpoints;

    private readonly Thresholds _thresholds;
    private readonly SignFlips _flips;
    private readonly FlipTables _tables;
    private readonly float[] _largest;
    private readonly int[] _laneCounts = new int[Row];

    public StepDownBlock(int sets, int capacity, SignFlips flips, Thresholds thresholds)
    {
        _thresholds = thresholds;
        _flips = flips;
        _tables = new FlipTables(sets, capacity, flips);
        _largest = new float[capacity * Row];
    }

    /// <summary>Pairs of a flip and a position that single precision could not decide.</summary>
    public List<(int Flip, int Position)> Undecided { get; } = [];

    /// <summary>Takes the flips <paramref name="first"/>… through all tiles of a panel.</summary>
    /// <param name="panel">The tiles.</param>
    /// <param name="first">First flip of the block.</param>
    /// <param name="maxima">Largest w of each flip of the block before the panel and, on return, after it.</param>
    /// <param name="counts">One count a position, raised by the flips that surely reach its threshold; shared between blocks.</param>
    public void Run(QuantizedPanel panel, int first, Span<float> maxima, int[] counts)
    {
        _tables.TakeFlips(_flips, first, maxima.Length);
        for (int flip = 0; flip < maxima.Length; flip++)
            Vector512.Create(maxima[flip]).CopyTo(_largest.AsSpan(flip * Row));
        for (int tile = 0; tile < panel.Tiles; tile++)
        {
            var sums = _tables.Sums(panel.Values(tile), maxima.Length);
            int position = (panel.FirstTile + tile) * Row;
            int everywhere = Follow(sums, panel.Scale(tile), position, first);
            for (int lane = 0; lane < Row; lane++)
                Interlocked.Add(ref counts[position + lane], everywhere + _laneCounts[lane]);
        }

        for (int flip = 0; flip < maxima.Length; flip++)
            maxima[flip] = LargestLane(Vector512.Create(_largest.AsSpan(flip * Row, Row)));
    }

    private int Follow(ReadOnlySpan<int> sums, TileScale scale, int position, int firstFlip)
    {
        Array.Clear(_laneCounts);
        var all = Vector512.Create(_thresholds.Surely[position + Row - 1]);
        var any = Vector512.Create(_thresholds.Possibly[position]);
        int everywhere = 0;
        for (int at = 0; at < sums.Length; at += Row)
        {
            var before = Vector512.Create(_largest.AsSpan(at, Row));
            var own = scale.Comparable(Vector512.Create(sums.Slice(at, Row)));
            var after = Vector512.Max(before, own);
            after.CopyTo(_largest.AsSpan(at, Row));
            if (Vector512.GreaterThanOrEqualAny(before, all))
                everywhere++;
            else if (Vector512.GreaterThanOrEqualAny(after, any))
                FollowLanes(LargestLane(before), own, position, firstFlip + at / Row);
        }

        return everywhere;
    }

    private void FollowLanes(float largest, Vector512<float> own, int position, int flip)
    {
        Span<float> lanes = stackalloc float[Row];
        own.CopyTo(lanes);
        for (int lane = 0; lane < Row; lane++)
        {
            largest = Math.Max(largest, lanes[lane]);
            if (largest >= _thresholds.Surely[position + lane])
                _laneCounts[lane]++;
            else if (largest >= _thresholds.Possibly[position + lane])
                Undecided.Add((flip, position + lane));
        }
    }

    private static float LargestLane(Vector512<float> lanes)
    {
        var eight = Vector256.Max(lanes.GetLower(), lanes.GetUpper());
        var four = Vector128.Max(eight.GetLower(), eight.GetUpper());
        return Math.Max(Math.Max(four[0], four[1]), Math.Max(four[2], four[3]));
    }
}
