namespace MatchedSuite.Statistics.Distributions;

/// <summary>A point x of the unit interval as the beta distribution with shapes a and b sees it, without loss at either end.</summary>
/// <param name="X">x.</param>
/// <param name="Y">1 − x, known on its own.</param>
/// <param name="LogX">log x, finite also where x underflows.</param>
/// <param name="LogY">log(1 − x), likewise.</param>
/// <param name="Excess">b·x − a·y: positive where x lies above the mean a/(a + b).</param>
internal readonly record struct BetaPoint(double X, double Y, double LogX, double LogY, double Excess)
{
    /// <summary>The point with the given x and y = 1 − x, both strictly between 0 and 1.</summary>
    public static BetaPoint At(double x, double y, double a, double b) =>
        new(x, y, x < 0.5 ? Math.Log(x) : LogOnePlus.Of(-y), y < 0.5 ? Math.Log(y) : LogOnePlus.Of(-x), Difference(b, x, a, y));

    /// <summary>The point with log(x/y) = <paramref name="logOdds"/>.</summary>
    public static BetaPoint AtLogOdds(double logOdds, double a, double b)
    {
        double small = Math.Exp(-Math.Abs(logOdds));
        double large = 1 / (1 + small);
        double logLarge = -LogOnePlus.Of(small);
        double logSmall = logLarge - Math.Abs(logOdds);
        small *= large;
        return logOdds < 0
            ? new BetaPoint(small, large, logSmall, logLarge, Difference(b, small, a, large))
            : new BetaPoint(large, small, logLarge, logSmall, Difference(b, large, a, small));
    }

    /// <summary>x = df2/(df2 + df1·f) for the shapes a = df2/2, b = df1/2: the lower beta tail is the upper tail of F.</summary>
    public static BetaPoint AtVarianceRatio(double f, double df1, double df2)
    {
        double odds = df1 * f / df2;
        double x = 1 / (1 + odds);
        double y = double.IsPositiveInfinity(odds) ? 1 : odds * x;
        double logOdds = Math.Log(df1 / df2) + Math.Log(f);
        double logX = double.IsPositiveInfinity(odds) ? -logOdds : -LogOnePlus.Of(odds);
        return new BetaPoint(x, y, logX, odds > 1 ? -LogOnePlus.Of(1 / odds) : logOdds + logX, double.IsPositiveInfinity(odds) ? -0.5 * df2 : 0.5 * df1 * (1 - f) * x);
    }

    /// <summary>The same point seen by the shapes b and a.</summary>
    public BetaPoint Mirrored => new(Y, X, LogY, LogX, -Excess);

    // b·x − a·y to the last digit (Kahan's fused difference of products).
    private static double Difference(double b, double x, double a, double y)
    {
        double product = a * y;
        double slip = Math.FusedMultiplyAdd(-a, y, product);
        return Math.FusedMultiplyAdd(b, x, -product) + slip;
    }
}
