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
        Designs = DesignTable.All.Select(design => design.Kind).ToHashSet(),
        Layouts = new HashSet<ValueLayout> { ValueLayout.SampleRows, ValueLayout.EndpointRows },
        Methods = ByDesignAndKind((design, kind) => design.MethodsFor(kind)),
        DefaultMethods = ByDesignAndKind((design, kind) => [.. KnownNames.UsualMethods(design.Kind, kind).Where(design.MethodsFor(kind).Contains)]),
        Adjustments = [.. AdjustmentTable.All.Select(adjustment => adjustment.Name)],
        Transforms = Enum.GetValues<Transform>().ToHashSet(),
        Families = Enum.GetValues<FamilyRule>().ToHashSet(),
        Intervals = new HashSet<IntervalKind> { IntervalKind.Fcr, IntervalKind.Simultaneous },
        IntervalsOfDesign = DesignTable.All.ToDictionary(design => design.Kind, design => design.Intervals),
        Contrasts = Enum.GetValues<VisitContrast>().ToHashSet(),
        Keys = new HashSet<string>
        {
            "design.stratum", "design.covariates", "endpoints.below-limit", "endpoints.scale", "analysis.across", "analysis.intervals",
        },
        KeysOfDesign = DesignTable.All.ToDictionary(design => design.Kind, design => design.Keys),
    };

    private static Dictionary<(DesignKind Design, EndpointKind Endpoint), IReadOnlyList<string>> ByDesignAndKind(
        Func<DesignEntry, EndpointKind, IReadOnlyList<string>> names) =>
        DesignTable.All
            .SelectMany(design => Enum.GetValues<EndpointKind>().Select(kind => (Key: (design.Kind, kind), Names: names(design, kind))))
            .Where(of => of.Names.Count > 0)
            .ToDictionary(of => of.Key, of => of.Names);
}
