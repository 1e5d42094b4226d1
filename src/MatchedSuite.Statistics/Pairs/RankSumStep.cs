using System.Runtime.Intrinsics;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>One step of the distribution of a sum of ranks with random signs.</summary>
internal static class RankSumStep
{
    /// <summary>
    /// Lets one more rank be positive with probability ½: mass(w) ← ½·mass(w) + ½·mass(w − rank), in place, for the sums
    /// 0 .. length − 1.
    /// </summary>
    /// <param name="mass">Probability of each sum before the step; entry w is the sum w.</param>
    /// <param name="rank">The rank, at least 1.</param>
    public static void AddRank(Span<double> mass, int rank)
    {
        // Downwards, so that what is read was not yet changed: a block is read whole before it is written.
        var half = Vector256.Create(0.5);
        int w = mass.Length - Vector256<double>.Count;
        for (; w >= rank; w -= Vector256<double>.Count)
        {
            var moved = Vector256.Create(mass[(w - rank)..]) + Vector256.Create(mass[w..]);
            (moved * half).CopyTo(mass[w..]);
        }

        for (int single = w + Vector256<double>.Count - 1; single >= 0; single--)
            mass[single] = 0.5 * (single >= rank ? mass[single - rank] + mass[single] : mass[single]);
    }
}
