namespace MatchedSuite.Statistics.Distributions;

/// <summary>The binomial distribution: X successes in n independent trials with success probability p.</summary>
/// <remarks>Tails through the incomplete beta function; the point probability by Loader (2000), which keeps its digits for any n.</remarks>
public static class Binomial
{
    /// <summary>P(X ≥ x). NaN for <paramref name="p"/> gives a missing probability.</summary>
    /// <param name="x">Any count; below 1 the answer is 1, above n it is 0.</param>
    /// <param name="n">Trials, 0 or more.</param>
    /// <param name="p">Success probability, in [0, 1].</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="n"/> or <paramref name="p"/> is out of range.</exception>
    public static Probability UpperTail(long x, long n, double p)
    {
        CheckTrials(n, p);
        if (double.IsNaN(p))
            return Probability.Missing;
        if (x <= 0)
            return Probability.One;
        if (x > n || p == 0)
            return Probability.Zero;
        if (p == 1)
            return Probability.One;
        double a = x;
        double b = n - x + 1;
        return RegularizedBeta.Lower(a, b, BetaPoint.At(p, 1 - p, a, b));
    }

    /// <summary>P(X ≤ x). NaN for <paramref name="p"/> gives a missing probability.</summary>
    /// <param name="x">Any count; below 0 the answer is 0, at n and above it is 1.</param>
    /// <param name="n">Trials, 0 or more.</param>
    /// <param name="p">Success probability, in [0, 1].</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="n"/> or <paramref name="p"/> is out of range.</exception>
    public static Probability LowerTail(long x, long n, double p)
    {
        CheckTrials(n, p);
        if (double.IsNaN(p))
            return Probability.Missing;
        if (x < 0)
            return Probability.Zero;
        if (x >= n || p == 0)
            return Probability.One;
        if (p == 1)
            return Probability.Zero;
        double a = x + 1;
        double b = n - x;
        return RegularizedBeta.Upper(a, b, BetaPoint.At(p, 1 - p, a, b));
    }

    /// <summary>P(X = x). NaN for <paramref name="p"/> gives a missing probability.</summary>
    /// <param name="x">Any count; outside 0..n the answer is 0.</param>
    /// <param name="n">Trials, 0 or more.</param>
    /// <param name="p">Success probability, in [0, 1].</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="n"/> or <paramref name="p"/> is out of range.</exception>
    public static Probability Point(long x, long n, double p)
    {
        CheckTrials(n, p);
        if (double.IsNaN(p))
            return Probability.Missing;
        if (x < 0 || x > n)
            return Probability.Zero;
        if (p == 0 || p == 1)
            return x == (p == 0 ? 0 : n) ? Probability.One : Probability.Zero;
        if (x == 0)
            return Tails.Scaled(n * LogOnePlus.Of(-p), 1);
        if (x == n)
            return Tails.Scaled(n * Math.Log(p), 1);
        double successes = x;
        double failures = n - x;
        BetaPoint point = BetaPoint.At(p, 1 - p, successes, failures);
        // C(n, x)·p^x·q^(n−x) is the beta kernel p^x·q^(n−x)/B(x, n−x) times n/(x·(n−x)).
        return Tails.Scaled(RegularizedBeta.LogDensity(successes, failures, point),
            RegularizedBeta.DensityScale(successes, failures) * (n / (successes * failures)));
    }

    /// <summary>Exact limits of the success probability (Clopper and Pearson 1934), 0 at x = 0 and 1 at x = n.</summary>
    /// <param name="x">Successes, 0 to n.</param>
    /// <param name="n">Trials, 1 or more.</param>
    /// <param name="tailShare">Probability left outside at each end, strictly between 0 and 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">An argument is out of range.</exception>
    public static Interval ExactLimits(long x, long n, double tailShare)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(n, 1);
        ArgumentOutOfRangeException.ThrowIfNegative(x);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(x, n);
        Require.OpenUnitInterval(tailShare);
        double low = x == 0 ? 0 : BetaDistribution.LowerQuantile(tailShare, x, n - x + 1);
        double high = x == n ? 1 : BetaDistribution.UpperQuantile(tailShare, x + 1, n - x);
        return new Interval(low, high);
    }

    private static void CheckTrials(long n, double p)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(n);
        if (p is < 0 or > 1)
            throw new ArgumentOutOfRangeException(nameof(p), p, "A probability lies between 0 and 1.");
    }
}
