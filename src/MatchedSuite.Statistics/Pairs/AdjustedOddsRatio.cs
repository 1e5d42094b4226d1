using System.Runtime.InteropServices;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>Odds ratio of a yes/no endpoint between the roles of a pair, adjusted for covariates.</summary>
/// <remarks>
/// <para>Among pairs whose two values differ, the log odds that it is the index member who has a 1 are a constant plus the covariate
/// differences times their slopes; this is conditional logistic regression of the endpoint on role and covariates. Estimate: the
/// constant, the adjusted log odds ratio; statistic: Wald's z. Without covariates the estimate is log(b/c) as in
/// <see cref="McNemar"/>. Separation, collinear covariates and their remarks are those of
/// <see cref="ConditionalLogistic"/>.</para>
/// <para>Assumes independent pairs, linear effects on the log odds, and several discordant pairs for each covariate. Source: Breslow and
/// Day (1980), Statistical Methods in Cancer Research 1, ch. VII. Worked through in docs/methods/mcnemar.md.</para>
/// </remarks>
public static class AdjustedOddsRatio
{
    /// <summary>Tests one endpoint with the values 0 and 1.</summary>
    /// <param name="sample">The endpoint with its covariates; its exposure is not used.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory of the calling thread.</param>
    /// <returns>
    /// <see cref="Outcome.TooFewSets"/> without pairs, <see cref="Outcome.NothingDiffers"/> where no pair is discordant, and what
    /// <see cref="ConditionalLogistic"/> cannot compute. Sets and samples count all pairs.
    /// </returns>
    /// <exception cref="ArgumentException">A value is neither 0 nor 1, or the confidence is out of range.</exception>
    public static TestResult Run(in RegressionPairs sample, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        var pairs = sample.Pairs;
        int n = pairs.Count, discordant = PairedTable.Of(pairs).Discordant;
        if (n == 0)
            return TestResult.Untested(Outcome.TooFewSets, 0, 0);
        if (discordant == 0)
            return TestResult.Untested(Outcome.NothingDiffers, n, 2 * n);

        // A set of two for each discordant pair: the index member has role 1 and the covariate differences, the other 0 and none.
        using var frame = scratch.Open();
        int members = 2 * discordant;
        Span<double> roles = frame.Doubles(members);
        Span<int> starts = frame.Integers(discordant + 1);
        Span<bool> hasOne = MemoryMarshal.Cast<long, bool>(frame.Longs((members + 7) / 8))[..members];
        Span<double> covariates = frame.Doubles(members * sample.CovariateCount);
        int set = 0;
        for (int i = 0; i < n; i++)
        {
            if (pairs.Index[i] == pairs.Reference[i])
                continue;
            int member = 2 * set;
            starts[set++] = member;
            (roles[member], roles[member + 1]) = (1, 0);
            (hasOne[member], hasOne[member + 1]) = (pairs.Index[i] == 1, pairs.Reference[i] == 1);
            for (int column = 0; column < sample.CovariateCount; column++)
            {
                covariates[(column * members) + member] = sample.Covariate(column)[i];
                covariates[(column * members) + member + 1] = 0;
            }
        }

        starts[discordant] = members;
        var result = ConditionalLogistic.Run(SetSample.Of(roles, starts, hasOne, covariates, frame), options, scratch);
        return result with { Sets = n, Samples = 2 * n };
    }
}
