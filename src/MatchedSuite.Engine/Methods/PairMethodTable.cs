using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>The methods for pairs, one line each; a new method is one more line.</summary>
public static class PairMethodTable
{
    private static readonly EndpointKind[] Continuous = [EndpointKind.Continuous];
    private static readonly EndpointKind[] Binary = [EndpointKind.Binary];
    private static readonly EndpointKind[] Ordinal = [EndpointKind.Ordinal];
    private static readonly EndpointKind[] Count = [EndpointKind.Count];
    private static readonly EndpointKind[] Ordered = [EndpointKind.Continuous, EndpointKind.Ordinal];

    /// <summary>Every method, the usual first choice of a kind before the others.</summary>
    public static IReadOnlyList<PairMethod> All { get; } =
    [
        new("paired-t", Continuous, EstimateScale.Analysis, StrataComparison.Means, PairedMean) { Covariates = CovariateUse.Adjusted, Flips = FlipRule.Differences, EffectInterval = StandardisedMean },
        new(ModeratedFinish.Method, Continuous, EstimateScale.Analysis, StrataComparison.None, Plain(PairedT.Run)),
        new("signed-rank", Ordered, EstimateScale.Analysis, StrataComparison.Estimates, SignedRanks) { Flips = FlipRule.SignedRanks },
        new("sign", Ordered, EstimateScale.Analysis, StrataComparison.Estimates, Plain(SignTest.Run)),
        new("sign-flip", Continuous, EstimateScale.Analysis, StrataComparison.Estimates, Plain(SignFlipMean.Run)),
        new("trimmed-mean", Continuous, EstimateScale.Analysis, StrataComparison.Means, Plain(TrimmedMean.Run)),
        new("mcnemar-exact", Binary, EstimateScale.NaturalLog, StrataComparison.Discordance, Plain(McNemarExact.Run)),
        new("mcnemar-midp", Binary, EstimateScale.NaturalLog, StrataComparison.Discordance, Plain(McNemarMidP.Run)),
        new("mcnemar", Binary, EstimateScale.NaturalLog, StrataComparison.Discordance, Plain(McNemar.Run)),
        new("mcnemar-corrected", Binary, EstimateScale.NaturalLog, StrataComparison.Discordance, Plain(McNemarCorrected.Run)),
        new("conditional-logistic", Binary, EstimateScale.NaturalLog, StrataComparison.Estimates, AdjustedOdds) { Covariates = CovariateUse.Adjusted },
        new("stuart-maxwell", Ordinal, EstimateScale.Analysis, StrataComparison.None, Plain(StuartMaxwell.Run)),
        new("bowker", Ordinal, EstimateScale.Analysis, StrataComparison.None, Plain(Bowker.Run)),
        new("paired-poisson", Count, EstimateScale.NaturalLog, StrataComparison.Estimates, Rates),
        new(KnownNames.WithinPairSlope, Continuous, EstimateScale.Analysis, StrataComparison.Means, Slope) { Covariates = CovariateUse.Adjusted },
    ];

    /// <summary>Names of the methods for a kind of endpoint.</summary>
    public static IReadOnlyList<string> NamesFor(EndpointKind kind) =>
        [.. All.Where(method => method.Kinds.Contains(kind)).Select(method => method.Name)];

    /// <summary>The method of this name.</summary>
    /// <exception cref="KeyNotFoundException">There is none; the study reader has checked names before.</exception>
    public static PairMethod Named(string name) =>
        All.FirstOrDefault(method => method.Name == name) ?? throw new KeyNotFoundException($"There is no pair method '{name}'.");

    private delegate TestResult PlainTest(in PairSample pairs, TestOptions options, Scratch scratch);

    private static PairTest Plain(PlainTest test) => (in PairInput input, TestOptions options, Scratch scratch) => test(input.Pairs, options, scratch);

    private static TestResult PairedMean(in PairInput input, TestOptions options, Scratch scratch) =>
        input.Covariates.IsEmpty
            ? PairedT.Run(input.Pairs, options, scratch)
            : AdjustedPairedT.Run(RegressionPairs.WithCovariates(input.Pairs, input.Covariates), options, scratch);

    private static Interval StandardisedMean(TestResult result, TestOptions options) =>
        EffectSizeInterval.Of(result.Statistic, result.Sets, options);

    private static TestResult SignedRanks(in PairInput input, TestOptions options, Scratch scratch) =>
        input.Zeros == ZeroRule.Pratt
            ? SignedRankPratt.Run(input.Pairs, options, scratch)
            : SignedRank.Run(input.Pairs, options, scratch);

    private static TestResult AdjustedOdds(in PairInput input, TestOptions options, Scratch scratch) =>
        AdjustedOddsRatio.Run(RegressionPairs.WithCovariates(input.Pairs, input.Covariates), options, scratch);

    private static TestResult Rates(in PairInput input, TestOptions options, Scratch scratch) => PairedPoisson.Run(
        input.IndexTime.IsEmpty ? EventTotals.Of(input.Pairs) : EventTotals.Of(input.Pairs, input.IndexTime, input.ReferenceTime), options);

    private static TestResult Slope(in PairInput input, TestOptions options, Scratch scratch) => WithinPairSlope.Run(
        RegressionPairs.WithExposure(input.Pairs, input.Exposure, input.Covariates), options, scratch);
}
