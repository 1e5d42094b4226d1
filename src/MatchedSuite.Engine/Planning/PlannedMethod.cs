using MatchedSuite.Engine.Methods;

namespace MatchedSuite.Engine.Planning;

/// <summary>A method in the place it has in a plan.</summary>
/// <param name="Code">Its position in <see cref="AnalysisPlan.MethodNames"/>.</param>
/// <param name="Method">The method.</param>
/// <param name="IsPrimary">True for the first method of the endpoint's kind.</param>
public sealed record PlannedMethod(short Code, PairMethod Method, bool IsPrimary);
