using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>Confidence interval of the standardised mean difference: the population's mean over sd of the within-pair differences.</summary>
/// <remarks>
/// The paired t has a noncentral t distribution with noncentrality √n · mean/sd. The limits are the noncentralities under which the observed
/// t is at a tail share, divided by √n: exact for normal differences, and 0 lies outside exactly when p &lt; 1 − confidence.
/// Hedges' correction changes the point estimate alone. Source: Steiger and Fouladi (1997), in What if there were no significance
/// tests?, ch. 9. Worked through in docs/methods/paired-t.md.
/// </remarks>
public static class EffectSizeInterval
{
    /// <summary>The interval that belongs to a paired t; it costs some microseconds, so it is not part of every result.</summary>
    /// <param name="t">Statistic of <see cref="PairedT"/>; NaN gives no interval.</param>
    /// <param name="pairs">Number of pairs, at least 2.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <exception cref="ArgumentOutOfRangeException">There are fewer than two pairs, the confidence is out of range, or t is infinite.</exception>
    public static Interval Of(double t, int pairs, TestOptions options)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(pairs, 2);
        Require.OpenUnitInterval(options.Confidence);
        double df = pairs - 1, root = Math.Sqrt(pairs);
        // The upper tail of a larger t is smaller; for a limit from above the mirrored t has it.
        double low = options.Sides == Sides.Less ? double.NegativeInfinity : NoncentralT.Noncentrality(t, df, options.TailShare) / root;
        double high = options.Sides == Sides.Greater ? double.PositiveInfinity : -NoncentralT.Noncentrality(-t, df, options.TailShare) / root;
        return double.IsNaN(t) ? Interval.None : new Interval(low, high);
    }
}
