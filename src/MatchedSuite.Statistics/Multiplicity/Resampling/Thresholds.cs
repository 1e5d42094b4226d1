namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>What each endpoint's observed statistic asks of a flip, and how near a w from whole-number sums must be before it decides nothing.</summary>
/// <remarks>
/// <para>Positions run over whole tiles, least significant first, padding included. A w from whole-number sums at or above Surely
/// means that the one from the differences themselves is at or above Exact; below Possibly means that it is below; between them it
/// has to be asked.</para>
/// <para>Error bound: r is off by at most δ from rounding to whole numbers, and by a few units of 2^-53 of itself; squaring doubles
/// both, and bending multiplies a relative error by 1 + k·w at most. 2^-45 covers the roundings and their products with room. Where
/// the differences are multiples of a step δ is next to nothing, and the band is narrower than the tolerance for ties: their many
/// ties are decided at once.</para>
/// </remarks>
internal sealed class Thresholds
{
    private const double RelativeRounding = 1.0 / (1L << 45);

    // The bend is taken as straight over the width of the margin, which holds within this factor up to this relative width.
    private const double Curvature = 1.25;
    private const double LargestRelativeWidth = 0.1;

    private readonly double _rounding;
    private readonly double _bend;

    /// <summary>Sets the thresholds of every tested endpoint.</summary>
    public Thresholds(ScaledEndpoints endpoints)
    {
        for (int place = 0; place < endpoints.Count; place++)
        {
            _rounding = Math.Max(_rounding, endpoints.ScaleAt(place).Rounding);
            _bend = Math.Max(_bend, endpoints.ScaleAt(place).Bend);
        }

        Padding = QuantizedPanel.PaddingOf(endpoints);
        Exact = new double[Padding + endpoints.Count];
        Surely = new double[Exact.Length];
        Possibly = new double[Exact.Length];
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

    /// <summary>From here on a w from whole-number sums has reached it, ascending.</summary>
    public double[] Surely { get; }

    /// <summary>Below this a w from whole-number sums has not reached it, ascending.</summary>
    public double[] Possibly { get; }

    /// <summary>The values from whole-number sums between which an exact w may lie on either side of <paramref name="w"/>.</summary>
    public (double Possibly, double Surely) Around(double w)
    {
        double size = Math.Abs(w);
        double absolute = 2 * _rounding * Math.Sqrt(size) + _rounding * _rounding + RelativeRounding * size;
        double margin = Curvature * (1 + _bend * size) * absolute;
        bool isStraight = (1 + _bend * size) * absolute <= LargestRelativeWidth * size || _bend == 0;
        return (Math.BitDecrement(w - margin), isStraight ? Math.BitIncrement(w + margin) : double.PositiveInfinity);
    }
}
