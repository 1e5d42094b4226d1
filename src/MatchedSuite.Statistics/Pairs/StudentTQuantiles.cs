using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>Upper quantiles of Student's t at one tail share, each found once and kept: thousands of endpoints share few degrees of freedom.</summary>
/// <remarks>
/// Safe for several threads: an entry is written whole, and whoever writes it writes the same bits. The tables of all tail
/// shares that a process uses stay in memory, 32 KB each.
/// </remarks>
internal sealed class StudentTQuantiles
{
    private const int LargestKept = 4095;

    private static StudentTQuantiles[] Known = [];

    private readonly double[] _byDegreesOfFreedom = new double[LargestKept + 1];

    private StudentTQuantiles(double tailShare) => TailShare = tailShare;

    private double TailShare { get; }

    /// <summary>The quantiles for <paramref name="tailShare"/>, the probability above them.</summary>
    public static StudentTQuantiles For(double tailShare)
    {
        while (true)
        {
            var known = Volatile.Read(ref Known);
            foreach (var quantiles in known)
            {
                if (quantiles.TailShare == tailShare)
                    return quantiles;
            }

            Interlocked.CompareExchange(ref Known, [.. known, new StudentTQuantiles(tailShare)], known);
        }
    }

    /// <summary>t with P(T ≥ t) equal to the tail share.</summary>
    /// <param name="df">Degrees of freedom, at least 1.</param>
    public double At(int df)
    {
        if (df > LargestKept)
            return StudentT.UpperQuantile(TailShare, df);
        double kept = Volatile.Read(ref _byDegreesOfFreedom[df]);
        // A quantile of exactly 0 (tail share ½) is found anew each time: it costs nothing there.
        if (kept != 0)
            return kept;
        double found = StudentT.UpperQuantile(TailShare, df);
        Volatile.Write(ref _byDegreesOfFreedom[df], found);
        return found;
    }
}
