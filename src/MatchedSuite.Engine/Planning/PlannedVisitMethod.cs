using MatchedSuite.Engine.Methods;

namespace MatchedSuite.Engine.Planning;

/// <summary>A method in the place it has in the plan of one comparison of visits.</summary>
/// <param name="Code">Its position in <see cref="AnalysisPlan.MethodNames"/>.</param>
/// <param name="IsPrimary">True for the first method of the endpoint's kind that makes the comparison.</param>
/// <param name="Pairs">The method where it is one for pairs.</param>
/// <param name="Visits">The method where it looks at all visits together.</param>
public sealed record PlannedVisitMethod(short Code, bool IsPrimary, PlannedMethod? Pairs, VisitMethod? Visits);
