using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>The methods for matched sets, one line each; a new method is one more line.</summary>
public static class SetMethodTable
{
    private static readonly EndpointKind[] Continuous = [EndpointKind.Continuous];
    private static readonly EndpointKind[] Binary = [EndpointKind.Binary];
    private static readonly EndpointKind[] Ordered = [EndpointKind.Continuous, EndpointKind.Ordinal, EndpointKind.Count];
    private static readonly EndpointKind[] Any = Enum.GetValues<EndpointKind>();

    /// <summary>A method that has nothing to say beside its result.</summary>
    private delegate TestResult PlainTest(in SetSample sets, TestOptions options, Scratch scratch);

    /// <summary>Every method, the usual first choice of a kind before the others.</summary>
    public static IReadOnlyList<SetMethod> All { get; } =
    [
        new(KnownNames.ConditionalLogistic, Any, EstimateScale.NaturalLog, StrataComparison.Estimates, ConditionalLogisticDetails.Test) { Extras = ConditionalLogisticDetails.Extras },
        Plain("within-set-linear", Continuous, EstimateScale.Analysis, StrataComparison.Means, WithinSetLinear.Run),
        Plain("within-set-robust", Continuous, EstimateScale.Analysis, StrataComparison.Means, WithinSetRobust.Run),
        Plain("aligned-rank", Ordered, EstimateScale.Analysis, StrataComparison.Estimates, AlignedRank.Run),
        Plain("set-relabel", Ordered, EstimateScale.Analysis, StrataComparison.Estimates, SetRelabel.Run),
        Plain("mantel-haenszel", Binary, EstimateScale.NaturalLog, StrataComparison.Estimates, MantelHaenszel.Run),
    ];

    /// <summary>Names of the methods for a kind of endpoint.</summary>
    public static IReadOnlyList<string> NamesFor(EndpointKind kind) =>
        [.. All.Where(method => method.Kinds.Contains(kind)).Select(method => method.Name)];

    /// <summary>The method of this name.</summary>
    /// <exception cref="KeyNotFoundException">There is none; the study reader has checked names before.</exception>
    public static SetMethod Named(string name) =>
        All.FirstOrDefault(method => method.Name == name) ?? throw new KeyNotFoundException($"There is no method for sets '{name}'.");

    private static SetMethod Plain(string name, EndpointKind[] kinds, EstimateScale scale, StrataComparison strata, PlainTest test) =>
        new(name, kinds, scale, strata, (in SetSample sets, TestOptions options, Scratch scratch, Evaluation.DetailSink _) => test(sets, options, scratch));
}
