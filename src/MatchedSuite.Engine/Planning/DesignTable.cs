using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Running;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Planning;

/// <summary>The kinds of design this version can analyse, one line each.</summary>
public static class DesignTable
{
    /// <summary>Every kind.</summary>
    public static IReadOnlyList<DesignEntry> All { get; } =
    [
        new(DesignKind.Pairs, inputs => new PairsDesign(inputs), PairMethodTable.NamesFor)
        {
            FlipOf = name => PairMethodTable.Named(name).Flips,
            Keys = ["design.exposure", "design.person-time", "analysis.zeros"],
            Intervals = [IntervalKind.EffectSize],
        },
        new(DesignKind.Sets, inputs => new SetsDesign(inputs), SetMethodTable.NamesFor)
        {
            Relabels = _ => true,
            Keys = ["design.reuse"],
            Intervals = [IntervalKind.Profile],
        },
        new(DesignKind.Visits, inputs => new VisitsDesign(inputs), VisitMethodTable.NamesFor)
        {
            FlipOf = name => VisitMethodTable.Named(name) is null ? PairMethodTable.Named(name).Flips : null,
            Keys = ["design.visit.window", "design.person-time", "analysis.zeros"],
            Intervals = [IntervalKind.EffectSize],
        },
        new(DesignKind.ChangeByArm, inputs => new ArmsDesign(inputs), ArmMethodTable.NamesFor)
        {
            Relabels = name => ArmMethodTable.Named(name) is not null,
            Keys = ["design.visit.window", "design.person-time", "analysis.zeros"],
        },
        new(DesignKind.Crossover, inputs => new CrossoverDesign(inputs), CrossoverMethodTable.NamesFor),
    ];

    /// <summary>The entry of a study's kind of design.</summary>
    public static DesignEntry Of(StudyDefinition study) => All.Single(entry => entry.Kind == study.Design.Kind);

    /// <summary>Lays out a study's comparisons and methods.</summary>
    public static IDesign Lay(StudyInputs inputs) => Of(inputs.Study).Lay(inputs);
}
