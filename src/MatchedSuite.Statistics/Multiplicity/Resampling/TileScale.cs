using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>From the whole-number sums of sixteen endpoints to the scale on which endpoints are compared.</summary>
/// <remarks>Every step is one rounded operation on each lane, so the result is the same on every machine; <see cref="Thresholds"/> bounds its error.</remarks>
internal readonly struct TileScale(ReadOnlySpan<double> factors, ReadOnlySpan<double> bends, bool isBent, Sides sides)
{
    private readonly Vector512<double> _lowerFactors = Vector512.Create(factors[..8]);
    private readonly Vector512<double> _upperFactors = Vector512.Create(factors[8..]);
    private readonly Vector512<double> _lowerBends = Vector512.Create(bends[..8]);
    private readonly Vector512<double> _upperBends = Vector512.Create(bends[8..]);
    private readonly Vector512<double> _kept = Vector512.Create(sides == Sides.Two ? long.MaxValue : -1).AsDouble();
    private readonly bool _isBent = isBent;

    /// <summary>w of lanes 0 to 7.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Vector512<double> Lower(Vector512<int> sums) =>
        Comparable(Vector512.ConvertToDouble(Vector512.WidenLower(sums)) * _lowerFactors, _lowerBends);

    /// <summary>w of lanes 8 to 15.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Vector512<double> Upper(Vector512<int> sums) =>
        Comparable(Vector512.ConvertToDouble(Vector512.WidenUpper(sums)) * _upperFactors, _upperBends);

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private Vector512<double> Comparable(Vector512<double> r, Vector512<double> bends)
    {
        var square = (r * Vector512.Abs(r)) & _kept;
        if (!_isBent)
            return square;
        var least = Vector512.MinNative(Vector512<double>.One, Vector512.Abs(square));
        return square / (Vector512<double>.One + bends - bends * least);
    }
}
