using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>Normal approximation of the signed-rank sum: variance corrected for ties, continuity correction ½.</summary>
/// <remarks>Sources: Hollander and Wolfe (1973), Nonparametric Statistical Methods, section 3.1; Pratt (1959), Journal of the
/// American Statistical Association 54, 655-667, for zeros that keep their ranks.</remarks>
internal static class SignedRankNormal
{
    private const double Continuity = 0.5;

    /// <summary>P(W ≤ sum) and P(W ≥ sum), approximately.</summary>
    /// <param name="sum">Sum of the ranks of positive differences.</param>
    /// <param name="ranks">Number of ranks, at least 1.</param>
    /// <param name="unsigned">How many of the lowest ranks belong to zeros and count on neither side.</param>
    /// <param name="tieTerm">Σ(t³ − t) over the groups of tied sizes.</param>
    public static (Probability Lower, Probability Upper) Tails(double sum, int ranks, int unsigned, double tieTerm)
    {
        var (mean, deviation) = Moments(ranks, unsigned, tieTerm);
        return (StandardNormal.LowerTail((sum + Continuity - mean) / deviation),
            StandardNormal.UpperTail((sum - Continuity - mean) / deviation));
    }

    /// <summary>Smallest w between 0 and n(n+1)/2 with P(W ≤ w) ≥ <paramref name="share"/>, approximately and without ties.</summary>
    public static long LowerQuantile(int n, double share)
    {
        var (mean, deviation) = Moments(n, 0, 0);
        double reach = deviation * StandardNormal.UpperQuantile(share);
        long largest = (long)(2 * mean);
        long w = Math.Clamp((long)Math.Ceiling(mean - Continuity - reach), 0, largest);
        // The quantile may sit within rounding of an integer; the tail itself decides.
        while (w > 0 && Tails(w - 1, n, 0, 0).Lower.Value >= share)
            w--;
        while (w < largest && Tails(w, n, 0, 0).Lower.Value < share)
            w++;
        return w;
    }

    private static (double Mean, double Deviation) Moments(int ranks, int unsigned, double tieTerm)
    {
        double n = ranks, zeros = unsigned;
        double variance = ((n * (n + 1) * ((2 * n) + 1)) - (zeros * (zeros + 1) * ((2 * zeros) + 1))) / 24;
        return (((n * (n + 1)) - (zeros * (zeros + 1))) / 4, Math.Sqrt(variance - (tieTerm / 48)));
    }
}
