namespace MatchedSuite.Statistics.Distributions;

/// <summary>The beta distribution on [0, 1] with shapes a and b, both greater than 0.</summary>
/// <remarks>Arguments below 0 and above 1 have the tails of 0 and 1.</remarks>
public static class BetaDistribution
{
    /// <summary>P(X &gt; x). NaN gives a missing probability.</summary>
    /// <param name="x">Any number.</param>
    /// <param name="a">First shape, greater than 0.</param>
    /// <param name="b">Second shape, greater than 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">A shape is not greater than 0.</exception>
    public static Probability UpperTail(double x, double a, double b)
    {
        Require.PositiveFinite(a);
        Require.PositiveFinite(b);
        if (double.IsNaN(x))
            return Probability.Missing;
        if (x <= 0)
            return Probability.One;
        return x >= 1 ? Probability.Zero : RegularizedBeta.Upper(a, b, BetaPoint.At(x, 1 - x, a, b));
    }

    /// <summary>P(X &lt; x). NaN gives a missing probability.</summary>
    /// <param name="x">Any number.</param>
    /// <param name="a">First shape, greater than 0.</param>
    /// <param name="b">Second shape, greater than 0.</param>
    /// <exception cref="ArgumentOutOfRangeException">A shape is not greater than 0.</exception>
    public static Probability LowerTail(double x, double a, double b)
    {
        Require.PositiveFinite(a);
        Require.PositiveFinite(b);
        if (double.IsNaN(x))
            return Probability.Missing;
        if (x <= 0)
            return Probability.Zero;
        return x >= 1 ? Probability.One : RegularizedBeta.Lower(a, b, BetaPoint.At(x, 1 - x, a, b));
    }

    /// <summary>The x with P(X &lt; x) = p; NaN gives NaN.</summary>
    /// <param name="p">Lower tail, in [0, 1].</param>
    /// <param name="a">First shape, greater than 0.</param>
    /// <param name="b">Second shape, greater than 0.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="p"/> or a shape is out of range.</exception>
    public static double LowerQuantile(double p, double a, double b) => Quantile(Tails.Checked(p), a, b, 1);

    /// <summary>The x with P(X &gt; x) = p; NaN gives NaN.</summary>
    /// <param name="p">Upper tail, in [0, 1].</param>
    /// <param name="a">First shape, greater than 0.</param>
    /// <param name="b">Second shape, greater than 0.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="p"/> or a shape is out of range.</exception>
    public static double UpperQuantile(double p, double a, double b) => Quantile(Tails.Checked(p), b, a, -1);

    // The mirrored distribution measures 1 − x, whose log odds have the other sign.
    private static double Quantile(Probability p, double a, double b, int sign)
    {
        Require.PositiveFinite(a);
        Require.PositiveFinite(b);
        if (p.IsMissing)
            return double.NaN;
        double logOdds = p.Value switch
        {
            0 => double.NegativeInfinity,
            1 => double.PositiveInfinity,
            <= 0.5 => RegularizedBeta.LowerLogOdds(Tails.NaturalLog(p), a, b),
            _ => RegularizedBeta.UpperLogOdds(LogOnePlus.Of(-p.Value), a, b),
        };
        return 1 / (1 + Math.Exp(-sign * logOdds));
    }
}
