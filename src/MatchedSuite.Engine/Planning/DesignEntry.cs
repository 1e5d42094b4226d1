using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Planning;

/// <summary>A kind of design that this version can analyse.</summary>
/// <param name="Kind">The kind.</param>
/// <param name="Lay">Lays out a study's comparisons and methods.</param>
/// <param name="MethodsFor">Names of the methods for a kind of endpoint, in the order in which they are listed to the user.</param>
public sealed record DesignEntry(
    DesignKind Kind, Func<StudyDefinition, Arrangement, IDesign> Lay, Func<EndpointKind, IReadOnlyList<string>> MethodsFor);
