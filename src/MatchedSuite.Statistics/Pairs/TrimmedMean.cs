namespace MatchedSuite.Statistics.Pairs;

/// <summary>Trimmed t-test: is the mean of the middle three fifths of the within-pair differences zero?</summary>
/// <remarks>
/// <para>The lowest and the highest g = ⌊n/5⌋ differences are cut off; h = n − 2g remain. Estimate: their mean. Standard error:
/// √(S/(h(h − 1))) with S the sum of squares of all n differences after each cut one was moved to the nearest kept one
/// (winsorised), about their own mean. Statistic: estimate over standard error, Student's t with h − 1 degrees of freedom.
/// Fewer than five pairs lose none, and the test is the paired t.</para>
/// <para>Assumes independent pairs and differences that are symmetric, or a question about the trimmed mean itself; outliers on either side
/// do no harm while they are fewer than a fifth.</para>
/// <para>Sources: Tukey and McLaughlin (1963), Sankhya A 25, 331-352; Yuen (1974), Biometrika 61, 165-170. Worked through in
/// docs/methods/trimmed-mean.md.</para>
/// </remarks>
public static class TrimmedMean
{
    // A fifth at either end: Tukey and McLaughlin's usual choice.
    private const int OneCutOf = 5;

    /// <summary>Tests one endpoint.</summary>
    /// <param name="pairs">The complete pairs; at least two are needed.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory of the calling thread.</param>
    /// <returns>
    /// <see cref="Outcome.TooFewSets"/> for fewer than two pairs, <see cref="Outcome.NoVariation"/> where all differences that are kept
    /// are equal by the decimal rule.
    /// </returns>
    /// <exception cref="ArgumentOutOfRangeException">The confidence is not strictly between 0 and 1.</exception>
    public static TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        int n = pairs.Count;
        if (n < 2)
            return TestResult.Untested(Outcome.TooFewSets, n, 2 * n);

        using var frame = scratch.Open();
        Span<double> sorted = frame.Doubles(n);
        pairs.Differences.CopyTo(sorted);
        sorted.Sort();
        int cut = n / OneCutOf, kept = n - (2 * cut);
        var middle = sorted.Slice(cut, kept);
        if (middle[^1] - middle[0] <= FixedLanes.Largest(pairs.Roundings) && (cut > 0 || DecimalTies.AllEqual(pairs, scratch)))
            return TestResult.Untested(Outcome.NoVariation, n, 2 * n);

        double mean = MeanAndDeviation.Of(middle, scratch).Mean;
        sorted[..cut].Fill(middle[0]);
        sorted[(n - cut)..].Fill(middle[^1]);
        double deviation = MeanAndDeviation.Of(sorted, scratch).Deviation;
        double error = deviation * Math.Sqrt((n - 1.0) / ((double)kept * (kept - 1)));
        return StudentTest.Of(mean, error, kept - 1, options) with { Sets = n, Samples = 2 * n };
    }
}
