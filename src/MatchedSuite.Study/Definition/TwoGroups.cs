namespace MatchedSuite.Study.Definition;

/// <summary>A column whose cells say which of two groups a sample belongs to; other cells are of no interest.</summary>
/// <param name="Column">Name of the column.</param>
/// <param name="Index">Cell text of the index group.</param>
/// <param name="Reference">Cell text of the reference group.</param>
public sealed record TwoGroups(string Column, string Index, string Reference);
