using MatchedSuite.Engine.Planning;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Reporting;

/// <summary>What <c>check</c> prints of designs in which subjects pass through visits or periods.</summary>
internal static class DesignLines
{
    /// <summary>Lines of name and value; none for other designs.</summary>
    public static IEnumerable<(string Name, string Value)> Of(DesignSection design) => design.Kind switch
    {
        DesignKind.Visits => [Visits(design), ("contrasts", string.Join(", ", VisitComparisons.Of(design).Select(comparison => comparison.Name)))],
        DesignKind.ChangeByArm => [Visits(design), Groups("arms", design.Arm!, design), ("contrasts", string.Join(", ", ArmsDesign.ContrastNames(design)))],
        DesignKind.Crossover =>
        [
            ("periods", $"{design.Period!.Column}: {Order(design.Period)}"), Groups("treatments", design.Treatment!, design),
            ("contrasts", CrossoverDesign.ContrastName(design)),
        ],
        _ => [],
    };

    private static (string Name, string Value) Visits(DesignSection design) =>
        ("visits", $"{design.Visit!.Column}: {Order(design.Visit)}, reference '{design.Visit.Order[design.Visit.ReferencePosition]}'");

    private static (string Name, string Value) Groups(string name, TwoGroups groups, DesignSection design) =>
        (name, $"{groups.Column}: '{groups.Index}' compared with '{groups.Reference}' by {design.Subject}");

    private static string Order(OrderedGroups groups) => string.Join(", ", groups.Order.Select(text => $"'{text}'"));
}
