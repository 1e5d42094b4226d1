namespace MatchedSuite.Study.Definition;

/// <summary>When the visits should have taken place.</summary>
/// <param name="Column">Column with the day of a sample, a number.</param>
/// <param name="Limits">Limits of the visits that have some.</param>
public sealed record VisitWindow(string Column, IReadOnlyList<DayLimits> Limits);
