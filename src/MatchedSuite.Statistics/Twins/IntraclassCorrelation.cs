using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Twins;

/// <summary>Intraclass correlation ICC(1,1): how much of an endpoint's variance lies between sets rather than within them?</summary>
/// <remarks>
/// <para>One-way analysis of variance of n sets with k exchangeable members: ICC = (B − W)/(B + (k − 1)W), B and W the mean squares
/// between and within sets. F = B/W with n − 1 and n(k − 1) degrees of freedom; its exact limits become limits of the
/// correlation. p is for a correlation above 0: the upper tail of F. The correlation can be as low as −1/(k − 1).</para>
/// <para>Assumes normal values of equal spread and mean: members of a set are exchangeable, so a difference between roles counts as
/// variance within. Source: Shrout and Fleiss (1979), Psychological Bulletin 86, 420-428. Worked through in docs/methods/twins.md.</para>
/// </remarks>
public static class IntraclassCorrelation
{
    /// <summary>The correlation of twins (or other pairs) on one endpoint.</summary>
    /// <param name="pairs">The complete pairs; at least two are needed.</param>
    /// <param name="options">Sides and confidence of the interval.</param>
    /// <param name="scratch">Working memory of the calling thread.</param>
    public static IntraclassResult Of(in PairSample pairs, TestOptions options, Scratch scratch)
    {
        using var frame = scratch.Open();
        Span<double> values = frame.Doubles(2 * pairs.Count);
        for (int i = 0; i < pairs.Count; i++)
            (values[2 * i], values[(2 * i) + 1]) = (pairs.Index[i], pairs.Reference[i]);
        return Of(values, 2, options, scratch);
    }

    /// <summary>The correlation within sets of one size.</summary>
    /// <param name="values">Values set after set, finite, endpoint unit.</param>
    /// <param name="members">k: members of each set, at least 2.</param>
    /// <param name="options">Sides and confidence of the interval.</param>
    /// <param name="scratch">Working memory of the calling thread.</param>
    /// <returns><see cref="Outcome.TooFewSets"/> for fewer than two sets, <see cref="Outcome.NoVariation"/> where all values are equal.</returns>
    /// <exception cref="ArgumentException">The values are not whole sets.</exception>
    /// <exception cref="ArgumentOutOfRangeException">There are fewer than two members, or the confidence is out of range.</exception>
    public static IntraclassResult Of(ReadOnlySpan<double> values, int members, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        ArgumentOutOfRangeException.ThrowIfLessThan(members, 2);
        if (values.Length % members != 0)
            throw new ArgumentException($"There are {values.Length} values, which is not a whole number of sets of {members}.");
        int sets = values.Length / members;
        if (sets < 2)
            return IntraclassResult.Untested(Outcome.TooFewSets, sets);

        using var frame = scratch.Open();
        Span<double> means = frame.Doubles(sets);
        double within = 0;
        for (int set = 0; set < sets; set++)
        {
            var own = values.Slice(set * members, members);
            // From the first member on: equal values leave no rounding, whatever their size.
            double offset = 0;
            foreach (double value in own)
                offset += value - own[0];
            means[set] = own[0] + (offset / members);
            double squares = 0, sum = 0;
            foreach (double value in own)
            {
                double deviation = (value - own[0]) - (offset / members);
                squares += deviation * deviation;
                sum += deviation;
            }

            within += squares - (sum * sum / members);
        }

        double deviationOfMeans = MeanAndDeviation.Of(means, scratch).Deviation;
        double between = members * deviationOfMeans * deviationOfMeans;
        int df1 = sets - 1, df2 = sets * (members - 1);
        within /= df2;
        if (between == 0 && within == 0)
            return IntraclassResult.Untested(Outcome.NoVariation, sets);
        double f = between / within;
        return new IntraclassResult(
            Outcome.Tested, sets, Correlation(f, members), Limits(f, members, df1, df2, options), between, within, f, df1, df2,
            FisherF.UpperTail(f, df1, df2));
    }

    private static Interval Limits(double f, int members, int df1, int df2, TestOptions options) => Interval.Pointing(
        Correlation(f / FisherF.UpperQuantile(options.TailShare, df1, df2), members),
        Correlation(f * FisherF.UpperQuantile(options.TailShare, df2, df1), members), options.Sides);

    private static double Correlation(double f, int members) => double.IsPositiveInfinity(f) ? 1 : (f - 1) / (f + members - 1);
}
