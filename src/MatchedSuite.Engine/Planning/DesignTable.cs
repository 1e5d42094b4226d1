using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Planning;

/// <summary>The kinds of design this version can analyse, one line each.</summary>
public static class DesignTable
{
    private static readonly Dictionary<DesignKind, Func<StudyDefinition, Arrangement, IDesign>> Designs = new()
    {
        [DesignKind.Pairs] = (study, arrangement) => new PairsDesign(study, arrangement),
    };

    /// <summary>The kinds there are.</summary>
    public static IReadOnlySet<DesignKind> Kinds { get; } = Designs.Keys.ToHashSet();

    /// <summary>Lays out a study's comparisons and methods.</summary>
    public static IDesign Lay(StudyDefinition study, Arrangement arrangement) => Designs[study.Design.Kind](study, arrangement);
}
