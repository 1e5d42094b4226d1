using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Visits;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>A test on one endpoint's table of subjects seen at every visit.</summary>
public delegate TestResult VisitTest(in VisitSample sample, TestOptions options, Scratch scratch);

/// <summary>Gives the numbers beside such a test.</summary>
public delegate void VisitExtra(in VisitSample sample, Scratch scratch, DetailSink details);

/// <summary>One method that looks at all visits together, as the study file names it.</summary>
/// <param name="Name">Its name in the study file and in the column <c>method</c>.</param>
/// <param name="Kinds">The kinds of endpoint it applies to.</param>
/// <param name="Forms">The comparisons it can make.</param>
/// <param name="Strata">How its results are compared between strata.</param>
public sealed record VisitMethod(string Name, IReadOnlyList<EndpointKind> Kinds, VisitForms Forms, StrataComparison Strata)
{
    /// <summary>The test on complete subjects; null for the mixed model, whose one fit serves all comparisons and uses every visit.</summary>
    public VisitTest? Test { get; init; }

    /// <summary>The numbers beside it; null for none.</summary>
    public VisitExtra? Extra { get; init; }
}
