using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Engine.Methods;

/// <summary>Odds ratio of a binary endpoint between the roles of a pair, adjusted for covariates by conditional logistic regression.</summary>
/// <remarks>
/// The endpoint is the outcome: a pair is a set of two members, its case the member with the endpoint, and the role with the covariates
/// is what the outcome is regressed on. Without covariates the estimate is log(b/c) of McNemar's test.
/// </remarks>
internal static class PairedOdds
{
    private const double IndexRole = 1;
    private const double ReferenceRole = 0;

    /// <summary>Fits one endpoint; pairs that agree on it say nothing and take no part.</summary>
    public static TestResult Run(in PairInput input, TestOptions options, Scratch scratch)
    {
        int n = input.Pairs.Count;
        int columns = n == 0 ? 0 : input.Covariates.Length / n;
        using Scratch.Frame frame = scratch.Open();
        Span<double> roles = frame.Doubles(2 * n);
        Span<double> covariates = frame.Doubles(2 * n * columns);
        Span<int> starts = frame.Integers(n + 1);
        Span<bool> hasEndpoint = System.Runtime.InteropServices.MemoryMarshal.Cast<int, bool>(frame.Integers((2 * n + 3) / 4))[..(2 * n)];
        for (int pair = 0; pair < n; pair++)
        {
            starts[pair] = 2 * pair;
            roles[2 * pair] = IndexRole;
            roles[2 * pair + 1] = ReferenceRole;
            hasEndpoint[2 * pair] = input.Pairs.Index[pair] == 1;
            hasEndpoint[2 * pair + 1] = input.Pairs.Reference[pair] == 1;
            for (int column = 0; column < columns; column++)
            {
                covariates[2 * n * column + 2 * pair] = input.Covariates[column * n + pair];
                covariates[2 * n * column + 2 * pair + 1] = 0;
            }
        }

        starts[n] = 2 * n;
        return ConditionalLogistic.Run(SetSample.Of(roles, starts, hasEndpoint, covariates, frame), options, scratch);
    }
}
