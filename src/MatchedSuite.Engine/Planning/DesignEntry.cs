using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Running;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Planning;

/// <summary>A kind of design that this version can analyse.</summary>
/// <param name="Kind">The kind.</param>
/// <param name="Lay">Lays out a study's comparisons and methods.</param>
/// <param name="MethodsFor">Names of the methods for a kind of endpoint, in the order in which they are listed to the user.</param>
public sealed record DesignEntry(
    DesignKind Kind, Func<StudyInputs, IDesign> Lay, Func<EndpointKind, IReadOnlyList<string>> MethodsFor)
{
    /// <summary>How a method takes part in adjustments by sign flips; null where it cannot.</summary>
    public Func<string, FlipRule?> FlipOf { get; init; } = _ => null;

    /// <summary>Whether a method can be the primary one where adjustments exchange labels: sets whose members do, or subjects of two arms.</summary>
    public Func<string, bool> Relabels { get; init; } = _ => false;

    /// <summary>Optional keys of the study file that have an effect in this kind of design beside those of every kind.</summary>
    public IReadOnlyList<string> Keys { get; init; } = [];

    /// <summary>Intervals beside the marginal ones that this kind of design has beside those of every kind.</summary>
    public IReadOnlyList<IntervalKind> Intervals { get; init; } = [];
}
