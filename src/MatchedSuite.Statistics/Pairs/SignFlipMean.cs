using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>Randomisation test of the mean difference: what would the mean have been had each pair's roles been drawn by a coin?</summary>
/// <remarks>
/// <para>Under the null each difference may have either sign. Up to <see cref="LargestExact"/> pairs all 2ⁿ assignments count;
/// beyond, B random ones drawn from (seed, resample, set) and p = (1 + b)/(1 + B), b of them at least as extreme as the data.
/// Two-sided extreme: at least as large in size. Sums that agree within 1e-9 of the sum of sizes are ties.</para>
/// <para>Estimate: the mean, in the endpoint's unit. The limits invert the test: a shift is rejected or not by how many means of
/// subsets of the differences lie below it, so each limit is one of these means (Hartigan's typical values), over all subsets or
/// over the random ones. The interval excludes 0 exactly when p &lt; 1 − confidence. Infinite where no p can be that
/// small. No statistic beside the estimate, no standard error.</para>
/// <para>Assumes that flipping a pair's roles changes nothing under the null; no shape, no equal spread.</para>
/// <para>Sources: Fisher (1935), The Design of Experiments, ch. III; Hartigan (1969), Journal of the American Statistical
/// Association 64, 1303-1317; Phipson and Smyth (2010), Statistical Applications in Genetics and Molecular Biology 9:39.
/// Worked through in docs/methods/sign-flip.md.</para>
/// </remarks>
public static class SignFlipMean
{
    /// <summary>Most pairs for which all flips are listed: 2²⁰ of them.</summary>
    public const int LargestExact = ListedFlips.LargestCount;

    // Equal sums of decimals differ by rounding alone, far below this share of the sum of sizes.
    private const double TieShare = 1e-9;

    /// <summary>Tests one endpoint.</summary>
    /// <param name="pairs">The complete pairs; at least one is needed.</param>
    /// <param name="options">Sides, confidence, and the number and seed of random flips beyond <see cref="LargestExact"/> pairs.</param>
    /// <param name="scratch">Working memory of the calling thread.</param>
    /// <returns><see cref="Outcome.TooFewSets"/> without pairs, <see cref="Outcome.NothingDiffers"/> where all differences are zero.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The confidence is not strictly between 0 and 1, or there is no resample.</exception>
    public static TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(options.Resamples);
        int n = pairs.Count;
        if (n == 0)
            return TestResult.Untested(Outcome.TooFewSets, 0, 0);

        using var frame = scratch.Open();
        Span<double> differences = frame.Doubles(n);
        double sizes = 0;
        int signed = 0;
        for (int i = 0; i < n; i++)
        {
            bool isZero = DecimalTies.IsZero(pairs.Differences[i], pairs.Roundings[i]);
            differences[i] = isZero ? 0 : pairs.Differences[i];
            sizes += Math.Abs(differences[i]);
            signed += isZero ? 0 : 1;
        }

        if (signed == 0)
            return TestResult.Untested(Outcome.NothingDiffers, n, 2 * n, Remarks.Zeros);

        bool isExact = n <= LargestExact;
        var (p, low, high) = isExact
            ? Listed(differences, TieShare * sizes, options, frame)
            : RandomFlips.Test(differences, TieShare * sizes, options, scratch);
        bool isWide = (options.Sides != Sides.Less && double.IsInfinity(low)) || (options.Sides != Sides.Greater && double.IsInfinity(high));
        return new TestResult
        {
            Sets = n,
            Samples = 2 * n,
            Estimate = n == 1 ? differences[0] : MeanAndDeviation.Of(differences, scratch).Mean,
            Interval = Interval.Pointing(low, high, options.Sides),
            P = p,
            SmallestPossibleP = isExact ? SignFlips.SmallestP(signed, options.Sides) : Probability.Of(1 / (1.0 + options.Resamples)),
            Remarks = (isExact ? Remarks.Exact : Remarks.Resampled) | (signed < n ? Remarks.Zeros : 0) | (isWide ? Remarks.WideAsData : 0),
        };
    }

    // The lower tail and the upper limit are those of the mirrored differences.
    private static (Probability P, double Low, double High) Listed(
        ReadOnlySpan<double> differences, double tie, TestOptions options, in Scratch.Frame frame)
    {
        var flips = ListedFlips.Of(differences, tie, frame);
        Span<double> negated = frame.Doubles(differences.Length);
        for (int i = 0; i < negated.Length; i++)
            negated[i] = -differences[i];
        var mirrored = ListedFlips.Of(negated, tie, frame);
        return (Tails.ForSides(options.Sides, mirrored.UpperTail(), flips.UpperTail()),
            options.Sides == Sides.Less ? double.NegativeInfinity : flips.LowerLimit(options.TailShare),
            options.Sides == Sides.Greater ? double.PositiveInfinity : -mirrored.LowerLimit(options.TailShare));
    }
}
