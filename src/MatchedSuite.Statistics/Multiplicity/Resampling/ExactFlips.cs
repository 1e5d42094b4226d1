using System.Numerics;
using System.Runtime.Intrinsics;

namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>Settles from the differences themselves what whole-number sums left open: the few flips that come too near to a threshold.</summary>
/// <remarks>
/// A flip is followed once more from the least significant endpoint on. Whole-number sums show which endpoints come near any
/// of its open thresholds; only those are summed from their differences.
/// </remarks>
internal sealed class ExactFlips
{
    private const int Row = Lanes.Endpoints;

    private readonly ScaledEndpoints _endpoints;
    private readonly Thresholds _thresholds;
    private readonly ISignPatterns _flips;
    private readonly SortedDictionary<int, OpenFlip> _open = [];

    public ExactFlips(ScaledEndpoints endpoints, Thresholds thresholds, ISignPatterns flips)
    {
        _endpoints = endpoints;
        _thresholds = thresholds;
        _flips = flips;
    }

    /// <summary>Asks whether a flip's largest w up to a position reaches that position's threshold.</summary>
    public void AskPosition(int flip, int position) => Open(flip).Positions.Add(position);

    /// <summary>Asks for a flip's largest w over all positions, attained by an endpoint at or above <paramref name="floor"/> by its whole-number sums.</summary>
    public void AskMaximum(int flip, double floor)
    {
        var open = Open(flip);
        open.MaximumFloor = Math.Min(open.MaximumFloor, floor);
    }

    /// <summary>Answers what was asked: raises the counts of the positions that are reached and returns the largest w by flip.</summary>
    public Dictionary<int, double> Settle(QuantizedPanel panel, int[] counts, CancellationToken cancellation)
    {
        if (_open.Count == 0)
            return [];
        int[] flips = [.. _open.Keys];
        var parallel = new ParallelOptions { MaxDegreeOfParallelism = _endpoints.Options.Threads, CancellationToken = cancellation };
        foreach (var open in _open.Values)
            open.Positions.Sort();
        for (int tile = 0; tile < QuantizedPanel.TilesOf(_endpoints); tile += panel.Tiles)
        {
            panel.Load(tile, cancellation);
            Parallel.For(0, flips.Length, parallel, () => new double[_endpoints.Sets], (at, _, differences) =>
            {
                Follow(panel, flips[at], _open[flips[at]], differences, counts);
                return differences;
            }, _ => { });
        }

        return flips.ToDictionary(flip => flip, flip => _open[flip].Largest);
    }

    private OpenFlip Open(int flip)
    {
        if (!_open.TryGetValue(flip, out var open))
            _open.Add(flip, open = new OpenFlip());
        return open;
    }

    private void Follow(QuantizedPanel panel, int flip, OpenFlip open, Span<double> differences, int[] counts)
    {
        Span<ulong> words = new ulong[_flips.Words];
        _flips.Fill(flip, words);
        if (_endpoints.Sets % 64 != 0)
            words[^1] &= (1UL << _endpoints.Sets) - 1;
        Span<double> lanes = stackalloc double[Row];
        for (int tile = 0; tile < panel.Tiles && !open.IsAnswered; tile++)
        {
            var sums = SumOf(panel.Values(tile), words);
            panel.Scale(tile).Lower(sums).CopyTo(lanes);
            panel.Scale(tile).Upper(sums).CopyTo(lanes[(Row / 2)..]);
            int position = (panel.FirstTile + tile) * Row;
            for (int lane = 0; lane < Row; lane++)
            {
                int place = position + lane - _thresholds.Padding;
                if (place >= 0 && lanes[lane] >= open.Floor(_thresholds))
                    open.Largest = Math.Max(open.Largest, _endpoints.Comparable(place, words, differences));
                if (open.NextPosition == position + lane && open.Answer(_thresholds))
                    Interlocked.Increment(ref counts[position + lane]);
            }
        }
    }

    private static Vector512<int> SumOf(ReadOnlySpan<int> values, ReadOnlySpan<ulong> flip)
    {
        var sum = Vector512<int>.Zero;
        for (int at = 0; at < values.Length; at += Row)
            sum += Vector512.Create(values.Slice(at, Row));
        for (int word = 0; word < flip.Length; word++)
        {
            for (ulong bits = flip[word]; bits != 0; bits &= bits - 1)
            {
                var changed = Vector512.Create(values.Slice((word * 64 + BitOperations.TrailingZeroCount(bits)) * Row, Row));
                sum -= changed + changed;
            }
        }

        return sum;
    }

    private sealed class OpenFlip
    {
        private int _answered;

        public List<int> Positions { get; } = [];

        public double MaximumFloor { get; set; } = double.PositiveInfinity;

        public double Largest { get; set; } = double.NegativeInfinity;

        public int NextPosition => _answered < Positions.Count ? Positions[_answered] : int.MaxValue;

        public bool IsAnswered => _answered == Positions.Count && double.IsPositiveInfinity(MaximumFloor);

        // Thresholds ascend, so the next open position has the lowest of those that remain.
        public double Floor(Thresholds thresholds) =>
            _answered < Positions.Count ? Math.Min(MaximumFloor, thresholds.Possibly[Positions[_answered]]) : MaximumFloor;

        public bool Answer(Thresholds thresholds) => Largest >= thresholds.Exact[Positions[_answered++]];
    }
}
