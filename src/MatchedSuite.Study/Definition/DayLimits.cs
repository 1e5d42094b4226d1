namespace MatchedSuite.Study.Definition;

/// <summary>First and last day, both allowed, on which a visit should have taken place.</summary>
/// <param name="Visit">Cell text of the visit.</param>
/// <param name="From">First day.</param>
/// <param name="To">Last day.</param>
public sealed record DayLimits(string Visit, double From, double To);
