using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Arms;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>A test on the changes of two arms.</summary>
public delegate TestResult ArmTest(in ArmSample sample, TestOptions options, Scratch scratch);

/// <summary>One method that compares changes between arms, as the study file names it.</summary>
/// <param name="Name">Its name in the study file and in the column <c>method</c>.</param>
/// <param name="Kinds">The kinds of endpoint it applies to.</param>
/// <param name="Strata">How its results are compared between strata.</param>
/// <param name="Test">The test itself.</param>
public sealed record ArmMethod(string Name, IReadOnlyList<EndpointKind> Kinds, StrataComparison Strata, ArmTest Test);
