using MatchedSuite.Statistics;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>A test on one endpoint's complete pairs.</summary>
public delegate TestResult PairTest(in PairInput input, TestOptions options, Scratch scratch);

/// <summary>One method for pairs, as the study file names it.</summary>
/// <param name="Name">Its name in the study file and in the column <c>method</c>.</param>
/// <param name="Kinds">The kinds of endpoint it applies to.</param>
/// <param name="Scale">What its estimate means, which decides whether a ratio is given.</param>
/// <param name="Strata">How its results are compared between strata.</param>
/// <param name="Test">The test itself.</param>
public sealed record PairMethod(string Name, IReadOnlyList<EndpointKind> Kinds, EstimateScale Scale, StrataComparison Strata, PairTest Test)
{
    /// <summary>Interval of its effect size, on request; null where it has none.</summary>
    public Func<TestResult, TestOptions, Interval>? EffectInterval { get; init; }

    /// <summary>What it does with covariates.</summary>
    public CovariateUse Covariates { get; init; } = CovariateUse.Ignored;

    /// <summary>How it takes part in adjustments by sign flips; null where it cannot.</summary>
    public FlipRule? Flips { get; init; }
}
