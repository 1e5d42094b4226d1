using MatchedSuite.Engine.Planning;
using MatchedSuite.Storage.Values;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>What this version can do, for the study reader: the tables decide, nothing is listed twice.</summary>
public static class Available
{
    /// <summary>The capabilities of this version.</summary>
    public static Capabilities InThisVersion { get; } = new()
    {
        Designs = DesignTable.Kinds,
        Layouts = new HashSet<ValueLayout> { ValueLayout.SampleRows, ValueLayout.EndpointRows },
        Methods = ByKind(kind => [.. PairMethodTable.All.Where(method => method.Kinds.Contains(kind)).Select(method => method.Name)]),
        DefaultMethods = ByKind(kind => [.. KnownNames.UsualMethods(DesignKind.Pairs, kind).Where(PairMethodTable.Has)]),
        Adjustments = [.. AdjustmentTable.All.Select(adjustment => adjustment.Name)],
        Transforms = new HashSet<Transform> { Transform.None, Transform.Log, Transform.Log2, Transform.Log10, Transform.Sqrt },
        Families = new HashSet<FamilyRule> { FamilyRule.All, FamilyRule.ByFamily },
        Keys = new HashSet<string>(),
    };

    private static Dictionary<(DesignKind Design, EndpointKind Endpoint), IReadOnlyList<string>> ByKind(
        Func<EndpointKind, IReadOnlyList<string>> names) =>
        Enum.GetValues<EndpointKind>()
            .Select(kind => (kind, Names: names(kind)))
            .Where(of => of.Names.Count > 0)
            .ToDictionary(of => (DesignKind.Pairs, of.kind), of => of.Names);
}
