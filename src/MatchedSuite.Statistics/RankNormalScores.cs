using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics;

/// <summary>Rank-based normal scores: each value is replaced by the normal quantile of its rank.</summary>
/// <remarks>
/// Score of rank r among n values: Φ⁻¹((r − 3/8)/(n + 1/4)); equal values share their middle rank. The scores are exactly
/// antisymmetric, so reversing the values changes signs alone. Source: Blom (1958), Statistical Estimates and Transformed
/// Beta-Variables. Worked through in docs/methods/rank-normal.md.
/// </remarks>
public static class RankNormalScores
{
    private const double Offset = 0.375;

    /// <summary>Writes the scores of one endpoint's values.</summary>
    /// <param name="values">Values in any unit; NaN is missing, stays NaN and counts nowhere.</param>
    /// <param name="scores">Receives one score a value; may be the same memory.</param>
    /// <param name="scratch">Working memory of the calling thread.</param>
    /// <exception cref="ArgumentException">The lengths differ.</exception>
    public static void Of(ReadOnlySpan<double> values, Span<double> scores, Scratch scratch)
    {
        Require.SameLength(values, scores);
        using var frame = scratch.Open();
        Span<double> sorted = frame.Doubles(values.Length);
        Span<int> places = frame.Integers(values.Length);
        int n = 0;
        for (int i = 0; i < values.Length; i++)
        {
            if (double.IsNaN(values[i]))
            {
                scores[i] = double.NaN;
                continue;
            }

            sorted[n] = values[i];
            places[n++] = i;
        }

        sorted[..n].Sort(places[..n]);
        for (int first = 0; first < n;)
        {
            int end = first + 1;
            while (end < n && sorted[end] == sorted[first])
                end++;
            double score = OfRank(0.5 * (first + 1 + end), n);
            foreach (int place in places[first..end])
                scores[place] = score;
            first = end;
        }
    }

    // The upper half mirrors the lower one bit for bit: ranks and their mirror images are exact.
    private static double OfRank(double rank, int n)
    {
        double mirrored = n + 1 - rank;
        return rank <= mirrored
            ? -StandardNormal.UpperQuantile((rank - Offset) / (n + 0.25))
            : StandardNormal.UpperQuantile((mirrored - Offset) / (n + 0.25));
    }
}
