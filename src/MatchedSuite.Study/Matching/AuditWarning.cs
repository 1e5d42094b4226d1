namespace MatchedSuite.Study.Matching;

/// <summary>Something a reader of the results should know; with <c>--strict</c> it refuses the run.</summary>
/// <param name="Code">Fixed code in kebab-case: <c>not-in-values</c>.</param>
/// <param name="Text">One sentence for people.</param>
public sealed record AuditWarning(string Code, string Text);
