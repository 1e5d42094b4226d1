using MatchedSuite.Statistics.Arms;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>The methods that compare changes between arms, one line each. Methods for pairs describe the change within each arm beside them.</summary>
public static class ArmMethodTable
{
    private static readonly EndpointKind[] Continuous = [EndpointKind.Continuous];
    private static readonly EndpointKind[] Ordered = [EndpointKind.Continuous, EndpointKind.Ordinal, EndpointKind.Count];

    /// <summary>Every method, the usual first choice before the others.</summary>
    public static IReadOnlyList<ArmMethod> All { get; } =
    [
        new("change-ancova", Continuous, StrataComparison.Means, ChangeAncova.Run),
        new("change-welch", Continuous, StrataComparison.Means, ChangeWelch.Run),
        new("change-rank-sum", Ordered, StrataComparison.Estimates, ChangeRankSum.Run),
    ];

    /// <summary>Names of the methods for a kind of endpoint, those for pairs last.</summary>
    public static IReadOnlyList<string> NamesFor(EndpointKind kind)
    {
        IReadOnlyList<string> known = KnownNames.MethodsFor(DesignKind.ChangeByArm, kind);
        return [.. All.Where(method => method.Kinds.Contains(kind)).Select(method => method.Name).Concat(PairMethodTable.NamesFor(kind)).Where(known.Contains)];
    }

    /// <summary>The method of this name; null where it is one for pairs.</summary>
    public static ArmMethod? Named(string name) => All.FirstOrDefault(method => method.Name == name);
}
