using MatchedSuite.Engine.Methods;

namespace MatchedSuite.Engine.Planning;

/// <summary>A crossover method in the place it has in a plan.</summary>
/// <param name="Code">Its position in <see cref="AnalysisPlan.MethodNames"/>.</param>
/// <param name="Method">The method.</param>
/// <param name="IsPrimary">True for the first method of the endpoint's kind.</param>
public sealed record PlannedCrossoverMethod(short Code, CrossoverMethod Method, bool IsPrimary);
