using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Engine.Methods;

/// <summary>The adjustments, one line each; a new one is one more line.</summary>
public static class AdjustmentTable
{
    /// <summary>Every adjustment.</summary>
    public static IReadOnlyList<Adjustment> All { get; } =
    [
        new("bonferroni", ErrorRate.FamilyWise, Bonferroni.Adjust),
        new("holm", ErrorRate.FamilyWise, Holm.Adjust),
        new("bh", ErrorRate.FalseDiscovery, BenjaminiHochberg.Adjust),
    ];

    /// <summary>The adjustment of this name.</summary>
    /// <exception cref="KeyNotFoundException">There is none; the study reader has checked names before.</exception>
    public static Adjustment Named(string name) =>
        All.FirstOrDefault(adjustment => adjustment.Name == name)
        ?? throw new KeyNotFoundException($"There is no adjustment '{name}'.");
}
