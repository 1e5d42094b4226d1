using MatchedSuite.Statistics.Arms;

namespace MatchedSuite.Statistics.Crossover;

/// <summary>The t-tests of a crossover of two treatments over two periods.</summary>
/// <remarks>
/// <para><see cref="Run"/>: treatment, adjusted for period. Half the difference period 1 − period 2 is compared between the
/// sequences; the difference of its means is index minus reference treatment. <see cref="Period"/>: the same halves with
/// their sign turned in one sequence give period 2 minus period 1. <see cref="CarryOver"/>: the subjects' totals compared
/// between sequences; index-first minus reference-first estimates how much more the index treatment lasts into period 2.</para>
/// <para>All are two-sample t with one variance and n − 2 degrees of freedom, in the endpoint's unit. Effect size: Hedges' g
/// of what is compared (halves or totals).</para>
/// <para>Assumes random sequences, independent subjects, near-normal differences, and for <see cref="Run"/> no carry-over.
/// The carry-over test has little power, and choosing the analysis by it makes the final test wrong: report it, don't
/// act on it.</para>
/// <para>Sources: Hills &amp; Armitage (1979), British Journal of Clinical Pharmacology 8, 7-20; Freeman (1989), Statistics in
/// Medicine 8, 1421-1432. Worked through in docs/methods/crossover-t.md.</para>
/// </remarks>
public static class CrossoverT
{
    /// <summary>Tests the treatments of one endpoint; at least two subjects a sequence are needed.</summary>
    public static TestResult Run(in CrossoverSample sample, TestOptions options, Scratch scratch) =>
        Test(sample, 0.5, -0.5, 1, options, scratch);

    /// <summary>Tests whether values of period 2 differ from those of period 1 beside the treatments.</summary>
    public static TestResult Period(in CrossoverSample sample, TestOptions options, Scratch scratch) =>
        Test(sample, -0.5, 0.5, -1, options, scratch);

    /// <summary>Tests whether one treatment lasts longer into period 2 than the other.</summary>
    public static TestResult CarryOver(in CrossoverSample sample, TestOptions options, Scratch scratch) =>
        Test(sample, 1, 1, 1, options, scratch);

    // Compares first·period 1 + second·period 2 of those with the index treatment first with the same of the others, turned.
    private static TestResult Test(
        in CrossoverSample sample, double first, double second, double turn, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        int n = sample.Count;
        if (Math.Min(sample.IndexFirstCount, sample.ReferenceFirstCount) < TwoSampleT.Fewest)
            return TestResult.Untested(Outcome.TooFewSets, n, 2 * n);
        using var frame = scratch.Open();
        Span<double> combined = frame.Doubles(n);
        double rounding = 0;
        for (int i = 0; i < n; i++)
        {
            double sign = i < sample.IndexFirstCount ? 1 : turn;
            combined[i] = sign * (first * sample.FirstPeriod[i] + second * sample.SecondPeriod[i]);
            rounding = Math.Max(rounding, DecimalRounding.Of(Math.Max(Math.Abs(sample.FirstPeriod[i]), Math.Abs(sample.SecondPeriod[i]))));
        }

        return TwoSampleT.Pooled(combined[..sample.IndexFirstCount], combined[sample.IndexFirstCount..], rounding, options, scratch) with
        {
            Sets = n,
            Samples = 2 * n,
        };
    }
}
