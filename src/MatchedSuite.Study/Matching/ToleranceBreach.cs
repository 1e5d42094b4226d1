namespace MatchedSuite.Study.Matching;

/// <summary>A complete set that breaks a promise of the matching.</summary>
/// <param name="Set">Name of the set.</param>
/// <param name="Column">The column that was promised to match.</param>
/// <param name="Index">The index side's value, as a text.</param>
/// <param name="Reference">The reference side's value, as a text.</param>
/// <param name="Promise">What was promised: <c>within 2</c>, <c>equal</c>.</param>
public sealed record ToleranceBreach(string Set, string Column, string Index, string Reference, string Promise);
