using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>The methods for pairs, one line each; a new method is one more line.</summary>
public static class PairMethodTable
{
    private static readonly EndpointKind[] Continuous = [EndpointKind.Continuous];
    private static readonly EndpointKind[] Binary = [EndpointKind.Binary];
    private static readonly EndpointKind[] Ordered = [EndpointKind.Continuous, EndpointKind.Ordinal];

    /// <summary>Every method, the usual first choice of a kind before the others.</summary>
    public static IReadOnlyList<PairMethod> All { get; } =
    [
        new("paired-t", Continuous, EstimateScale.Analysis, PairedT.Run),
        new("signed-rank", Ordered, EstimateScale.Analysis, SignedRank.Run),
        new("sign", Ordered, EstimateScale.Analysis, SignTest.Run),
        new("mcnemar-exact", Binary, EstimateScale.NaturalLog, McNemarExact.Run),
        new("mcnemar-midp", Binary, EstimateScale.NaturalLog, McNemarMidP.Run),
        new("mcnemar", Binary, EstimateScale.NaturalLog, McNemar.Run),
        new("mcnemar-corrected", Binary, EstimateScale.NaturalLog, McNemarCorrected.Run),
    ];

    /// <summary>Names of the methods for a kind of endpoint.</summary>
    public static IReadOnlyList<string> NamesFor(EndpointKind kind) =>
        [.. All.Where(method => method.Kinds.Contains(kind)).Select(method => method.Name)];

    /// <summary>The method of this name.</summary>
    /// <exception cref="KeyNotFoundException">There is none; the study reader has checked names before.</exception>
    public static PairMethod Named(string name) =>
        All.FirstOrDefault(method => method.Name == name) ?? throw new KeyNotFoundException($"There is no pair method '{name}'.");
}
