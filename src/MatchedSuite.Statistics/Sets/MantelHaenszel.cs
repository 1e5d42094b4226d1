using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Sets;

/// <summary>Mantel–Haenszel odds ratio: is a binary endpoint more often present in the index role, set by set?</summary>
/// <remarks>
/// <para>Shape: values 0 or 1, any numbers of both roles a set; each set is one 2×2 table. Estimate: log of the pooled odds ratio
/// Σ(a·d/n) / Σ(b·c/n); standard error of Robins, Breslow and Greenland; interval estimate ± z·error. Statistic: the squared sum of a −
/// E(a) over its hypergeometric variance, one degree of freedom, without continuity correction.</para>
/// <para>Where one of the two sums is zero the estimate is infinite, without standard error or interval; the test stands.
/// Covariates are not adjusted for. Assumes one odds ratio for all sets.</para>
/// <para>Sources: Mantel and Haenszel (1959), Journal of the National Cancer Institute 22(4), 719-748; Robins, Breslow and
/// Greenland (1986), Biometrics 42(2), 311-323. Worked through in docs/methods/mantel-haenszel.md.</para>
/// </remarks>
public static class MantelHaenszel
{
    /// <summary>Tests one endpoint.</summary>
    /// <param name="sets">The endpoint, 0 or 1, on its sets.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory of this thread; not needed here.</param>
    /// <exception cref="ArgumentException">A value is neither 0 nor 1.</exception>
    public static TestResult Run(in SetSample sets, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        Remarks remarks = sets.CovariateCount > 0 ? Remarks.Unadjusted : Remarks.None;
        if (sets.Sets == 0)
            return TestResult.Untested(Outcome.TooFewSets, 0, 0, remarks);
        Sums sums = default;
        for (int s = 0; s < sets.Sets; s++)
        {
            ReadOnlySpan<double> values = sets.Values[sets.Starts[s]..sets.Starts[s + 1]];
            int index = sets.IndexCounts[s];
            sums.Add(CountOnes(values[..index]), index, CountOnes(values[index..]), values.Length - index);
        }

        if (sums.Variance == 0)
            return TestResult.Untested(Outcome.NothingDiffers, sets.Sets, sets.Members, remarks);
        double z = sums.Excess / Math.Sqrt(sums.Variance);
        double estimate = sums.Against == 0 ? double.PositiveInfinity
            : sums.For == 0 ? double.NegativeInfinity
            : Math.Log(sums.For / sums.Against);
        double error = double.IsFinite(estimate) ? Math.Sqrt(sums.LogVariance) : double.NaN;
        double reach = error * StandardNormal.UpperQuantile(options.TailShare);
        return new TestResult
        {
            Sets = sets.Sets,
            Samples = sets.Members,
            Estimate = estimate,
            StandardError = error,
            Interval = double.IsNaN(error) ? Interval.None : Interval.Pointing(estimate - reach, estimate + reach, options.Sides),
            Statistic = z * z,
            DegreesOfFreedom = 1,
            P = Tails.ForSides(options.Sides, StandardNormal.LowerTail(z), StandardNormal.UpperTail(z)),
            Remarks = remarks | (double.IsNaN(error) ? Remarks.OneSidedDiscordance : Remarks.None),
        };
    }

    private static int CountOnes(ReadOnlySpan<double> values)
    {
        int ones = 0;
        foreach (double value in values)
        {
            if (value is not (0 or 1))
                throw new ArgumentException($"The value {value} is neither 0 nor 1; the Mantel-Haenszel method takes binary endpoints.");
            ones += (int)value;
        }

        return ones;
    }

    private struct Sums
    {
        // Sums over sets of what the source calls PR, PS + QR and QS.
        private double _both, _mixed, _neither;

        // Σ a·d/n and Σ b·c/n.
        public double For { get; private set; }

        public double Against { get; private set; }

        // Σ a − E(a) and its hypergeometric variance.
        public double Excess { get; private set; }

        public double Variance { get; private set; }

        public readonly double LogVariance =>
            (_both / (2 * For * For)) + (_mixed / (2 * For * Against)) + (_neither / (2 * Against * Against));

        public void Add(double indexOnes, double index, double referenceOnes, double reference)
        {
            double n = index + reference, ones = indexOnes + referenceOnes;
            double indexZeros = index - indexOnes, referenceZeros = reference - referenceOnes;
            double forShare = indexOnes * referenceZeros / n, againstShare = indexZeros * referenceOnes / n;
            double concordant = (indexOnes + referenceZeros) / n, discordant = (indexZeros + referenceOnes) / n;
            For += forShare;
            Against += againstShare;
            Excess += indexOnes - (index * ones / n);
            Variance += index * reference * ones * (n - ones) / (n * n * (n - 1));
            _both += concordant * forShare;
            _mixed += (concordant * againstShare) + (discordant * forShare);
            _neither += discordant * againstShare;
        }
    }
}
