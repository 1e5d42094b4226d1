using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>Upper quantiles of Student's t, kept once found: thousands of endpoints share few degrees of freedom and one tail share.</summary>
/// <remarks>Safe for several threads: an entry is written whole, and whoever writes it writes the same bits.</remarks>
internal sealed class StudentTQuantiles
{
    private const int LargestKept = 4095;

    // A run uses one or two tail shares. Whoever sweeps over many finds the later ones anew each time and fills no memory.
    private const int SharesKept = 16;

    private static StudentTQuantiles[] Known = [];

    private readonly double _tailShare;
    private readonly double[] _byDegreesOfFreedom = new double[LargestKept + 1];

    private StudentTQuantiles(double tailShare) => _tailShare = tailShare;

    /// <summary>t with P(T ≥ t) equal to the tail share.</summary>
    /// <param name="tailShare">Probability above, strictly between 0 and 1.</param>
    /// <param name="df">Degrees of freedom, at least 1.</param>
    public static double Upper(double tailShare, int df)
    {
        var known = Volatile.Read(ref Known);
        foreach (var quantiles in known)
        {
            if (quantiles._tailShare == tailShare)
                return quantiles.At(df);
        }

        // Where another thread added a table meanwhile, the next endpoint adds this one.
        if (known.Length < SharesKept)
            Interlocked.CompareExchange(ref Known, [.. known, new StudentTQuantiles(tailShare)], known);
        return StudentT.UpperQuantile(tailShare, df);
    }

    private double At(int df)
    {
        if (df > LargestKept)
            return StudentT.UpperQuantile(_tailShare, df);
        double kept = Volatile.Read(ref _byDegreesOfFreedom[df]);
        // A quantile of exactly 0 (tail share ½) is found anew each time: it costs nothing there.
        if (kept != 0)
            return kept;
        double found = StudentT.UpperQuantile(_tailShare, df);
        Volatile.Write(ref _byDegreesOfFreedom[df], found);
        return found;
    }
}
