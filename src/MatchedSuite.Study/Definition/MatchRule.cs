namespace MatchedSuite.Study.Definition;

/// <summary>One promise of the matching, audited set by set.</summary>
/// <param name="Column">Name of the column.</param>
/// <param name="Within">Largest difference allowed within a set; null when equality is asked.</param>
public sealed record MatchRule(string Column, double? Within);
