namespace MatchedSuite.Statistics.Distributions;

/// <summary>The noncentral t distribution: (Z + δ)/S with Z standard normal and df·S² chi-squared, independent.</summary>
/// <remarks>
/// It gives the power of t-tests and the limits of standardized effect sizes. Each tail is the integral of a normal tail over
/// the density of S, a positive integrand, so that small tails keep their digits; see <see cref="NoncentralTIntegral"/>.
/// Relative error near 1e-13. Source: Johnson, Kotz and Balakrishnan (1995), Continuous Univariate Distributions 2, ch. 31.
/// </remarks>
public static class NoncentralT
{
    // Above this a tail is taken from the other one, so that it never exceeds 1 and still falls where it is nearly 1.
    private const double LargeTail = 0.6;

    /// <summary>P(T &gt; t). NaN for <paramref name="t"/> or <paramref name="delta"/> gives a missing probability.</summary>
    /// <param name="t">Any number, also infinite.</param>
    /// <param name="df">Degrees of freedom, greater than 0, or +∞.</param>
    /// <param name="delta">Noncentrality, finite.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="df"/> or <paramref name="delta"/> is out of range.</exception>
    public static Probability UpperTail(double t, double df, double delta)
    {
        Require.Positive(df);
        if (double.IsInfinity(delta))
            throw new ArgumentOutOfRangeException(nameof(delta), delta, "The noncentrality must be finite.");
        if (double.IsNaN(t) || double.IsNaN(delta))
            return Probability.Missing;
        if (double.IsInfinity(t))
            return t > 0 ? Probability.Zero : Probability.One;
        if (double.IsPositiveInfinity(df))
            return StandardNormal.UpperTail(t - delta);
        if (delta == 0)
            return StudentT.UpperTail(t, df);
        Probability tail = NoncentralTIntegral.Upper(t, df, delta).Tail;
        return tail.Value <= LargeTail ? tail : Tails.Complement(NoncentralTIntegral.Upper(-t, df, -delta).Tail.Value);
    }

    /// <summary>P(T &lt; t). NaN for <paramref name="t"/> or <paramref name="delta"/> gives a missing probability.</summary>
    /// <param name="t">Any number, also infinite.</param>
    /// <param name="df">Degrees of freedom, greater than 0, or +∞.</param>
    /// <param name="delta">Noncentrality, finite.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="df"/> or <paramref name="delta"/> is out of range.</exception>
    public static Probability LowerTail(double t, double df, double delta) => UpperTail(-t, df, -delta);

    /// <summary>
    /// The noncentrality at which P(T &gt; t) = p: the lower limit of δ at tail share p, and at 1 − p the upper limit.
    /// An observed t of n pairs gives the limits of the standardized mean difference after division by √n.
    /// </summary>
    /// <param name="t">The observed statistic; NaN gives NaN.</param>
    /// <param name="df">Degrees of freedom, greater than 0, or +∞.</param>
    /// <param name="p">Upper tail, strictly between 0 and 1.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="df"/>, <paramref name="p"/> or <paramref name="t"/> is out of range.</exception>
    public static double Noncentrality(double t, double df, double p)
    {
        Require.Positive(df);
        Require.OpenUnitInterval(p);
        if (double.IsInfinity(t))
            throw new ArgumentOutOfRangeException(nameof(t), t, "The statistic must be finite.");
        if (double.IsNaN(t))
            return double.NaN;
        if (double.IsPositiveInfinity(df))
            return t - StandardNormal.UpperQuantile(p);
        return p <= 0.5 ? FromUpper(t, df, p) : -FromUpper(-t, df, 1 - p);
    }

    // The log of the tail is concave in δ: after one step Newton's method climbs to the root from below.
    private static double FromUpper(double t, double df, double p)
    {
        double target = Math.Log(p);
        double spread = Math.Sqrt(1 + t * t / (2 * df));
        double delta = t * (1 - 1 / (4 * Math.Max(df, 1))) - StandardNormal.UpperQuantile(p) * spread;
        for (int i = 0; i < 100; i++)
        {
            var (tail, slope) = NoncentralTIntegral.Upper(t, df, delta);
            double step = (target - Tails.NaturalLog(tail)) / slope;
            delta += step;
            if (Math.Abs(step) <= 1e-8 * spread)
                break;
        }
        return delta;
    }
}
