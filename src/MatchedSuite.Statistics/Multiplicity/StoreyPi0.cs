namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>The share of true nulls among the tested hypotheses, estimated from how many p-values are large.</summary>
/// <remarks>
/// <para>Above λ lie (1 − λ) of the true nulls' p-values and hardly any other, so π0(λ) = #{p &gt; λ}/((1 − λ)·m).</para>
/// <para>Sources: Storey (2002), J R Stat Soc B 64, 479-498; Storey, Taylor and Siegmund (2004), J R Stat Soc B 66, 187-205,
/// for the 1 added to the count; Storey and Tibshirani (2003), PNAS 100, 9440-9445, for the spline. Worked through in
/// docs/methods/storey-q.md.</para>
/// </remarks>
public static class StoreyPi0
{
    private const double DefaultLambda = 0.5;

    /// <summary>(1 + #{p &gt; λ})/((1 − λ)·m), at most 1; NaN where nothing was tested. Never 0, and conservative in small families.</summary>
    /// <param name="p">p-values in any order; missing ones are not counted.</param>
    /// <param name="lambda">Where "large" begins, strictly between 0 and 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">λ is out of range.</exception>
    public static double AtFixed(ReadOnlySpan<Probability> p, double lambda = DefaultLambda)
    {
        Require.OpenUnitInterval(lambda);
        int m = PValueOrder.CountTested(p);
        return m == 0 ? double.NaN : Math.Min(1, (1 + CountAbove(p, lambda)) / ((1 - lambda) * m));
    }

    /// <summary>
    /// π0(λ) at λ = 0.05, 0.10, …, 0.95, smoothed by a cubic spline with three degrees of freedom and read at 0.95; at most 1 and
    /// at least 1/m. NaN where nothing was tested. Meant for families of some hundreds and more.
    /// </summary>
    /// <param name="p">p-values in any order; missing ones are not counted.</param>
    public static double BySpline(ReadOnlySpan<Probability> p)
    {
        int m = PValueOrder.CountTested(p);
        if (m == 0)
            return double.NaN;
        ReadOnlySpan<double> weights = SmoothingWeights.AtLastPoint;
        double smoothed = 0;
        for (int point = 0; point < weights.Length; point++)
        {
            double lambda = (point + 1) * 0.05;
            smoothed += weights[point] * (CountAbove(p, lambda) / ((1 - lambda) * m));
        }

        return Math.Clamp(smoothed, 1.0 / m, 1);
    }

    private static double CountAbove(ReadOnlySpan<Probability> p, double lambda)
    {
        int count = 0;
        foreach (var one in p)
        {
            if (one.Value > lambda)
                count++;
        }

        return count;
    }
}
