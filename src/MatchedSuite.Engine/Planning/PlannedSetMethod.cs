using MatchedSuite.Engine.Methods;

namespace MatchedSuite.Engine.Planning;

/// <summary>A method for sets in the place it has in a plan.</summary>
/// <param name="Code">Its position in <see cref="AnalysisPlan.MethodNames"/>.</param>
/// <param name="Method">The method.</param>
/// <param name="IsPrimary">True for the first method of the endpoint's kind.</param>
/// <param name="Extras">What the study makes it compute beside the test.</param>
public sealed record PlannedSetMethod(short Code, SetMethod Method, bool IsPrimary, ReadOnlyMemory<SetExtra> Extras);
