using MatchedSuite.Statistics.Multiplicity.Resampling;

namespace MatchedSuite.Statistics.Tests.Multiplicity.Resampling;

/// <summary>Max-T as its definition reads, in double precision, one flip and one endpoint at a time: the twin of the fast one.</summary>
internal static class PlainMaxT
{
    // Ties are ties of the correlation that t stands for where all sets are there, as the documents say: within 1e-9 of it, and 1e-12
    // for what rounding leaves of a sum of zero.
    private const double TieTolerance = 1e-9;
    private const double ZeroTolerance = 1e-12;

    public static (int[] StepDown, int[] SingleStep, double Critical) Counts(double[] differences, int sets, ResamplingOptions options)
    {
        int endpoints = differences.Length / sets;
        var flips = new CommonFlips(sets, options.Seed, options.Resamples);
        double[] observed = Statistics(differences, sets, new ulong[flips.Words], options);
        int[] order = [.. Enumerable.Range(0, endpoints).Where(j => !double.IsNaN(observed[j])).OrderBy(j => observed[j])];
        var stepDown = Enumerable.Repeat(-1, endpoints).ToArray();
        var singleStep = Enumerable.Repeat(-1, endpoints).ToArray();
        foreach (int j in order)
            stepDown[j] = singleStep[j] = 0;
        var maxima = new List<double>();
        var flip = new ulong[flips.Words];
        for (int k = 0; k < flips.Count; k++)
        {
            flips.Fill(k, flip);
            double[] flipped = Statistics(differences, sets, flip, options);
            double largest = double.NegativeInfinity;
            foreach (int j in order)
            {
                largest = Math.Max(largest, flipped[j]);
                if (Reaches(largest, observed[j]))
                    stepDown[j]++;
            }

            maxima.Add(largest);
            foreach (int j in order)
            {
                if (Reaches(largest, observed[j]))
                    singleStep[j]++;
            }
        }

        for (int place = order.Length - 2; place >= 0; place--)
            stepDown[order[place]] = Math.Max(stepDown[order[place]], stepDown[order[place + 1]]);
        maxima.Sort();
        int allowed = (int)Math.Floor(options.Level * (flips.Count + 1) + 1e-9) - 1;
        return (stepDown, singleStep, allowed < 0 || order.Length == 0 ? double.PositiveInfinity : Back(maxima[^(allowed + 1)], sets, options));
    }

    private static double Back(double correlation, int sets, ResamplingOptions options) => options.Statistic == FlipStatistic.Score
        ? correlation
        : Math.Abs(correlation) < 1 ? Math.Sqrt(sets - 1) * correlation / Math.Sqrt(1 - (correlation * correlation)) : correlation / 0.0;

    // The correlation that t stands for, 1 where nothing varies; scores are their own. NaN where there is nothing to flip.
    private static double[] Statistics(double[] differences, int sets, ulong[] flip, ResamplingOptions options)
    {
        var statistics = new double[differences.Length / sets];
        for (int j = 0; j < statistics.Length; j++)
        {
            double sum = 0, squares = 0;
            int n = 0;
            for (int i = 0; i < sets; i++)
            {
                double d = differences[j * sets + i];
                if (double.IsNaN(d))
                    continue;
                n++;
                sum += (flip[i / 64] >> (i % 64) & 1) == 1 ? -d : d;
                squares += d * d;
            }

            double directed = options.Sides == Sides.Less ? -sum : sum;
            double t = options.Statistic == FlipStatistic.Score
                ? directed / Math.Sqrt(squares)
                : n < 2 ? double.NaN : directed / Math.Sqrt(n * Math.Max(0, squares - sum * sum / n) / (n - 1));
            double correlation = options.Statistic == FlipStatistic.Score ? t
                : double.IsInfinity(t) ? Math.Sign(t) : t / Math.Sqrt(sets - 1 + (t * t));
            statistics[j] = squares == 0 ? double.NaN : options.Sides == Sides.Two ? Math.Abs(correlation) : correlation;
        }

        return statistics;
    }

    private static bool Reaches(double statistic, double observed) =>
        statistic >= observed - TieTolerance * Math.Abs(observed) - ZeroTolerance;
}
