namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>What each endpoint's observed statistic asks of a flip, and how near a single-precision w must be before it decides nothing.</summary>
/// <remarks>
/// <para>Positions run over whole tiles, least significant first, padding included. A single-precision w at or above Surely means
/// that the exact one is at or above Exact; below Possibly means that it is below; between them the exact one has to be asked.</para>
/// <para>Error bound: r is off by at most δ from rounding to whole numbers, and by a few units of 2^-24 of itself; squaring doubles
/// both, and bending multiplies a relative error by 1 + k·w at most. 2^-19 covers a dozen roundings and their products with room.</para>
/// </remarks>
internal sealed class Thresholds
{
    private const double RelativeRounding = 1.0 / (1 << 19);

    // The bend is taken as straight over the width of the margin, which holds within this factor up to this relative width.
    private const double Curvature = 1.25;
    private const double LargestRelativeWidth = 0.1;

    private readonly double _rounding;
    private readonly double _bend;

    /// <summary>Sets the thresholds of every tested endpoint.</summary>
    public Thresholds(ScaledEndpoints endpoints)
    {
        _rounding = QuantizedPanel.LargestRounding(endpoints);
        for (int place = 0; place < endpoints.Count; place++)
            _bend = Math.Max(_bend, endpoints.ScaleAt(place).Bend);
        Padding = QuantizedPanel.PaddingOf(endpoints);
        Exact = new double[Padding + endpoints.Count];
        Surely = new float[Exact.Length];
        Possibly = new float[Exact.Length];
        for (int position = 0; position < Exact.Length; position++)
        {
            Exact[position] = endpoints.ScaleAt(Math.Max(0, position - Padding)).Threshold();
            (Possibly[position], Surely[position]) = Around(Exact[position]);
        }

        // Widening is always safe, and lets both be searched.
        for (int position = 1; position < Exact.Length; position++)
            Surely[position] = Math.Max(Surely[position], Surely[position - 1]);
        for (int position = Exact.Length - 2; position >= 0; position--)
            Possibly[position] = Math.Min(Possibly[position], Possibly[position + 1]);
    }

    /// <summary>Positions before the first endpoint.</summary>
    public int Padding { get; }

    /// <summary>The w that counts as having reached the observed one, ascending.</summary>
    public double[] Exact { get; }

    /// <summary>From here on a single-precision w has reached it, ascending.</summary>
    public float[] Surely { get; }

    /// <summary>Below this a single-precision w has not reached it, ascending.</summary>
    public float[] Possibly { get; }

    /// <summary>The single-precision values between which an exact w may lie on either side of <paramref name="w"/>.</summary>
    public (float Possibly, float Surely) Around(double w)
    {
        double size = Math.Abs(w);
        double absolute = 2 * _rounding * Math.Sqrt(size) + _rounding * _rounding + RelativeRounding * size;
        double margin = Curvature * (1 + _bend * size) * absolute;
        bool isStraight = (1 + _bend * size) * absolute <= LargestRelativeWidth * size || _bend == 0;
        return (MathF.BitDecrement((float)(w - margin)), isStraight ? MathF.BitIncrement((float)(w + margin)) : float.PositiveInfinity);
    }
}
