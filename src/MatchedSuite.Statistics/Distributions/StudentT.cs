namespace MatchedSuite.Statistics.Distributions;

/// <summary>Student's t distribution; any df &gt; 0, also fractional. At df = +∞ it is the standard normal.</summary>
/// <remarks>Relative error of a tail near 1e-14; its logarithm stays finite far below the smallest double. Source: Abramowitz and Stegun (1964) 26.7; see <see cref="StudentTail"/>.</remarks>
public static class StudentT
{
    // Up to this tail the root is sought in the tail, above it in the centre, where the tail hardly moves.
    private const double FarTail = 0.3;

    /// <summary>P(T &gt; t). NaN gives a missing probability.</summary>
    /// <param name="t">Any number, also infinite.</param>
    /// <param name="df">Degrees of freedom, greater than 0, or +∞.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="df"/> is not greater than 0.</exception>
    public static Probability UpperTail(double t, double df)
    {
        Require.Positive(df);
        if (double.IsNaN(t))
            return Probability.Missing;
        if (double.IsInfinity(t))
            return t > 0 ? Probability.Zero : Probability.One;
        return t >= 0 ? StudentTail.Upper(t, df) : Tails.Complement(StudentTail.Upper(-t, df).Value);
    }

    /// <summary>P(T &lt; t). NaN gives a missing probability.</summary>
    /// <param name="t">Any number, also infinite.</param>
    /// <param name="df">Degrees of freedom, greater than 0, or +∞.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="df"/> is not greater than 0.</exception>
    public static Probability LowerTail(double t, double df) => UpperTail(-t, df);

    /// <summary>The t with P(T &gt; t) = p; 0 gives +∞, 1 gives −∞, NaN gives NaN.</summary>
    /// <param name="p">Upper tail, in [0, 1].</param>
    /// <param name="df">Degrees of freedom, greater than 0, or +∞.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="df"/> or <paramref name="p"/> is out of range.</exception>
    public static double UpperQuantile(double p, double df) => UpperQuantile(Tails.Checked(p), df);

    /// <summary>The t with P(T &gt; t) = p, also for a p below the smallest double; +∞ where t itself is above the largest.</summary>
    /// <param name="p">Upper tail.</param>
    /// <param name="df">Degrees of freedom, greater than 0, or +∞.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="df"/> is not greater than 0.</exception>
    public static double UpperQuantile(Probability p, double df)
    {
        Require.Positive(df);
        if (p.IsMissing)
            return double.NaN;
        if (double.IsNegativeInfinity(p.Log10))
            return double.PositiveInfinity;
        if (p.Value > 0.5)
            return -UpperQuantile(Probability.Of(1 - p.Value), df);
        if (p.Value > FarTail)
            return p.Value == 0.5 ? 0 : StudentTail.NearQuantile(0.5 - p.Value, df);
        double logTail = Tails.NaturalLog(p);
        return StudentTail.FarQuantile(logTail, df, StandardNormal.RoughUpperQuantile(logTail));
    }
}
