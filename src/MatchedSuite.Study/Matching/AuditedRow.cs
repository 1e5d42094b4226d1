namespace MatchedSuite.Study.Matching;

/// <summary>What became of one row of the sample sheet: a line of <c>audit/dispositions.parquet</c>.</summary>
/// <param name="Row">Number of the row in the sheet, from 1, the header not counted.</param>
/// <param name="Sample">Name of the sample; its row number where the sheet has no key column; empty where the key is missing.</param>
/// <param name="Set">Cell of the link column; null where it is missing.</param>
/// <param name="Role">Cell of the role (visit, arm) column; null where it is missing.</param>
/// <param name="Disposition">What became of it.</param>
public sealed record AuditedRow(int Row, string Sample, string? Set, string? Role, Disposition Disposition);
