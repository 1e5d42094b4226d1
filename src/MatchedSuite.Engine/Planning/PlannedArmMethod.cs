using MatchedSuite.Engine.Methods;

namespace MatchedSuite.Engine.Planning;

/// <summary>A method that compares arms in the place it has in a plan.</summary>
/// <param name="Code">Its position in <see cref="AnalysisPlan.MethodNames"/>.</param>
/// <param name="Method">The method.</param>
/// <param name="IsPrimary">True for the first such method of the endpoint's kind.</param>
public sealed record PlannedArmMethod(short Code, ArmMethod Method, bool IsPrimary);
