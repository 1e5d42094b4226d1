using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>From the whole-number sums of sixteen endpoints to the scale on which endpoints are compared, in single precision.</summary>
/// <remarks>Every step is a single rounded operation on each lane, so the result is the same on every machine; <see cref="Thresholds"/> bounds its error.</remarks>
internal readonly struct TileScale(Vector512<float> factors, Vector512<float> bends, bool isBent, Sides sides)
{
    private readonly Vector512<float> _factors = factors;
    private readonly Vector512<float> _bends = bends;
    private readonly Vector512<float> _slopes = Vector512<float>.One + bends;
    private readonly Vector512<float> _kept = Vector512.Create(sides == Sides.Two ? 0x7FFFFFFF : -1).AsSingle();
    private readonly bool _isBent = isBent;

    /// <summary>w of each lane.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Vector512<float> Comparable(Vector512<int> sums)
    {
        var r = Vector512.ConvertToSingle(sums) * _factors;
        var square = (r * Vector512.Abs(r)) & _kept;
        return _isBent
            ? square / (_slopes - _bends * Vector512.Min(Vector512<float>.One, Vector512.Abs(square)))
            : square;
    }
}
