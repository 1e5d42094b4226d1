using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>A test on one endpoint's usable sets; numbers that have no column of their own go to the details.</summary>
public delegate TestResult SetTest(in SetSample sets, TestOptions options, Scratch scratch, DetailSink details);

/// <summary>Numbers beside a tested row that take another fit.</summary>
public delegate void SetExtra(in SetSample sets, TestOptions options, Scratch scratch, DetailSink details);

/// <summary>One method for matched sets, as the study file names it.</summary>
/// <param name="Name">Its name in the study file and in the column <c>method</c>.</param>
/// <param name="Kinds">The kinds of endpoint it applies to.</param>
/// <param name="Scale">What its estimate means, which decides whether a ratio is given.</param>
/// <param name="Strata">How its results are compared between strata.</param>
/// <param name="Test">The test itself.</param>
public sealed record SetMethod(string Name, IReadOnlyList<EndpointKind> Kinds, EstimateScale Scale, StrataComparison Strata, SetTest Test)
{
    /// <summary>What a study makes it compute beside the test, for a kind of endpoint.</summary>
    public Func<AnalysisSection, EndpointKind, IReadOnlyList<SetExtra>> Extras { get; init; } = (_, _) => [];
}
