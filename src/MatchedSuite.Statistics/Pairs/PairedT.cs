namespace MatchedSuite.Statistics.Pairs;

/// <summary>Paired t-test: is the mean within-pair difference zero?</summary>
/// <remarks>
/// <para>Statistic: mean / (sd/√n) with n − 1 degrees of freedom. Estimate, standard error and interval are in the endpoint's
/// unit. Effect size: mean / sd times Hedges' exact correction; NaN for two pairs, where it does not exist. Its interval is given
/// by <see cref="EffectSizeInterval"/>.</para>
/// <para>Mean and sum of squares take two passes, the second about the mean of the first, so large offsets lose no digit that
/// the differences still have.</para>
/// <para>Assumes independent pairs, and near-normal differences or many pairs.</para>
/// <para>Sources: Student (1908), Biometrika 6, 1-25; Chan, Golub and LeVeque (1983), The American Statistician 37, 242-247;
/// Hedges (1981), Journal of Educational Statistics 6, 107-128. Worked through in docs/methods/paired-t.md.</para>
/// </remarks>
public static class PairedT
{
    /// <summary>Tests one endpoint.</summary>
    /// <param name="pairs">The complete pairs; at least two are needed.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory of the calling thread.</param>
    /// <returns>
    /// <see cref="Outcome.TooFewSets"/> for fewer than two pairs, <see cref="Outcome.NoVariation"/> where all differences
    /// are equal by the decimal rule.
    /// </returns>
    /// <exception cref="ArgumentOutOfRangeException">The confidence is not strictly between 0 and 1.</exception>
    public static TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        int n = pairs.Count;
        if (n < 2)
            return TestResult.Untested(Outcome.TooFewSets, n, 2 * n);
        if (DecimalTies.AllEqual(pairs, scratch))
            return TestResult.Untested(Outcome.NoVariation, n, 2 * n);

        var (mean, deviation) = MeanAndDeviation.Of(pairs.Differences, scratch);
        int df = n - 1;
        return StudentTest.Of(mean, deviation / Math.Sqrt(n), df, options) with
        {
            Sets = n,
            Samples = 2 * n,
            EffectSize = HedgesCorrection.Factor(df) * mean / deviation,
        };
    }
}
