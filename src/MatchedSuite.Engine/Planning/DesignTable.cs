using MatchedSuite.Engine.Methods;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Planning;

/// <summary>The kinds of design this version can analyse, one line each.</summary>
public static class DesignTable
{
    /// <summary>Every kind.</summary>
    public static IReadOnlyList<DesignEntry> All { get; } =
    [
        new(DesignKind.Pairs, (study, arrangement) => new PairsDesign(study, arrangement), PairMethodTable.NamesFor),
    ];

    /// <summary>Lays out a study's comparisons and methods.</summary>
    public static IDesign Lay(StudyDefinition study, Arrangement arrangement) =>
        All.Single(entry => entry.Kind == study.Design.Kind).Lay(study, arrangement);
}
