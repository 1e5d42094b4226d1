using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Crossover;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>A test on the two periods of a crossover.</summary>
public delegate TestResult CrossoverTest(in CrossoverSample sample, TestOptions options, Scratch scratch);

/// <summary>Gives the numbers beside such a test.</summary>
public delegate void CrossoverExtra(in CrossoverSample sample, TestOptions options, Scratch scratch, DetailSink details);

/// <summary>One method for crossovers, as the study file names it.</summary>
/// <param name="Name">Its name in the study file and in the column <c>method</c>.</param>
/// <param name="Kind">The kind of endpoint it applies to.</param>
/// <param name="Scale">What its estimate means.</param>
/// <param name="Strata">How its results are compared between strata.</param>
/// <param name="Test">The test itself.</param>
public sealed record CrossoverMethod(string Name, EndpointKind Kind, EstimateScale Scale, StrataComparison Strata, CrossoverTest Test)
{
    /// <summary>The numbers beside it; null for none.</summary>
    public CrossoverExtra? Extra { get; init; }
}
