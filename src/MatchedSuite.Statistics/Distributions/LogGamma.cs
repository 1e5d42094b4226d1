namespace MatchedSuite.Statistics.Distributions;

/// <summary>Logarithm of the gamma function and of factorials.</summary>
/// <remarks>Stirling's series (Abramowitz and Stegun 1964, 6.1.41), carried down by the recurrence below 10.</remarks>
public static class LogGamma
{
    // 170! is the last factorial below the largest double.
    private static readonly double[] SmallFactorials = LogarithmsOfFactorials(170);

    /// <summary>log Γ(x); relative error near 1e-15, absolute near the zeros at 1 and 2. NaN gives NaN, +∞ gives +∞.</summary>
    /// <param name="x">Greater than 0.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="x"/> is 0 or less.</exception>
    public static double Of(double x)
    {
        if (double.IsNaN(x) || double.IsPositiveInfinity(x))
            return x;
        Require.Positive(x);
        return x < 10
            ? StirlingCorrection.LogGammaByShift(x)
            : (x - 0.5) * Math.Log(x) - x + StirlingCorrection.HalfLogTwoPi + StirlingCorrection.Of(x);
    }

    /// <summary>log n!</summary>
    /// <param name="n">0 or more.</param>
    /// <exception cref="ArgumentOutOfRangeException"><paramref name="n"/> is negative.</exception>
    public static double LogFactorial(long n)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(n);
        return n < SmallFactorials.Length ? SmallFactorials[n] : Of(n + 1.0);
    }

    private static double[] LogarithmsOfFactorials(int largest)
    {
        var logarithms = new double[largest + 1];
        double factorial = 1;
        for (int n = 1; n <= largest; n++)
        {
            factorial *= n;
            logarithms[n] = Math.Log(factorial);
        }
        return logarithms;
    }
}
