using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Crossover;

/// <summary>The Mainland–Gart test of a crossover with yes/no values: does one treatment give more yes, whatever the period does?</summary>
/// <remarks>
/// <para>Values are 0 or 1. Only subjects whose two periods differ count: those with yes in period 1 and those with yes in
/// period 2, by sequence, make a 2 × 2 table, tested by Fisher's exact test given its margins; two-sided p is twice the
/// smaller tail, at most 1.</para>
/// <para>Statistic: subjects with the index treatment first and yes in period 1 only. Estimate: log odds ratio of index
/// against reference treatment, half the conditional maximum-likelihood log odds ratio of the table (the treatment enters it
/// once with each sign); the limits invert the exact test, infinite where the table is at the end of what its margins allow.</para>
/// <para>Assumes random sequences, independent subjects, no carry-over.</para>
/// <para>Sources: Mainland (1963), Elementary Medical Statistics, 2nd edition; Gart (1969), Biometrika 56, 75-80.
/// Worked through in docs/methods/mainland-gart.md.</para>
/// </remarks>
public static class MainlandGart
{
    // Odds ratios beyond e^±700 are no numbers; bisection halves this until nothing is left.
    private const double Widest = 700;

    /// <summary>Tests one endpoint.</summary>
    /// <exception cref="ArgumentException">A value is neither 0 nor 1.</exception>
    public static TestResult Run(in CrossoverSample sample, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        int n = sample.Count, yesFirst = 0, indexFirst = 0, both = 0, discordant = 0;
        for (int i = 0; i < n; i++)
        {
            RequireSign(sample.FirstPeriod[i]);
            RequireSign(sample.SecondPeriod[i]);
            if (sample.FirstPeriod[i] == sample.SecondPeriod[i])
                continue;
            int isYesFirst = sample.FirstPeriod[i] == 1 ? 1 : 0, isIndexFirst = i < sample.IndexFirstCount ? 1 : 0;
            discordant++;
            yesFirst += isYesFirst;
            indexFirst += isIndexFirst;
            both += isYesFirst * isIndexFirst;
        }

        if (Math.Min(sample.IndexFirstCount, sample.ReferenceFirstCount) == 0)
            return TestResult.Untested(Outcome.TooFewSets, n, 2 * n);
        using var frame = scratch.Open();
        var table = new FisherHypergeometric(indexFirst, yesFirst, discordant, frame);
        if (table.Smallest == table.Largest)
            return TestResult.Untested(Outcome.NothingDiffers, n, 2 * n);

        var (lower, upper) = table.Tails(both, 0);
        double estimate = Estimate(table, both), low = LowerLimit(table, both, options.TailShare), high = UpperLimit(table, both, options.TailShare);
        bool isOpen = double.IsInfinity(low) || double.IsInfinity(high);
        return new TestResult
        {
            Sets = n,
            Samples = 2 * n,
            Estimate = estimate / 2,
            Interval = Interval.Pointing(low / 2, high / 2, options.Sides),
            Statistic = both,
            P = Tails.ForSides(options.Sides, lower, upper),
            Remarks = Remarks.Exact | (isOpen ? Remarks.OneSidedDiscordance : 0),
        };
    }

    private static double Estimate(in FisherHypergeometric table, int cell)
    {
        if (cell == table.Smallest)
            return double.NegativeInfinity;
        if (cell == table.Largest)
            return double.PositiveInfinity;
        double low = -Widest, high = Widest;
        while (Halve(ref low, ref high, out double middle))
            (low, high) = table.Mean(middle) < cell ? (middle, high) : (low, middle);
        return high;
    }

    // P(X ≥ cell) rises with the odds ratio; the limit is where it reaches the tail share.
    private static double LowerLimit(in FisherHypergeometric table, int cell, double share)
    {
        if (cell == table.Smallest)
            return double.NegativeInfinity;
        double low = -Widest, high = Widest;
        while (Halve(ref low, ref high, out double middle))
            (low, high) = table.Tails(cell, middle).Upper.Value < share ? (middle, high) : (low, middle);
        return high;
    }

    private static double UpperLimit(in FisherHypergeometric table, int cell, double share)
    {
        if (cell == table.Largest)
            return double.PositiveInfinity;
        double low = -Widest, high = Widest;
        while (Halve(ref low, ref high, out double middle))
            (low, high) = table.Tails(cell, middle).Lower.Value < share ? (low, middle) : (middle, high);
        return low;
    }

    private static bool Halve(ref double low, ref double high, out double middle)
    {
        middle = low + (high - low) / 2;
        return middle > low && middle < high && high - low > 1e-15 * Math.Max(1, Math.Abs(middle));
    }

    private static void RequireSign(double value)
    {
        if (value is not (0 or 1))
            throw new ArgumentException($"A yes/no value is {value:R}; it must be 0 or 1.", nameof(value));
    }
}
