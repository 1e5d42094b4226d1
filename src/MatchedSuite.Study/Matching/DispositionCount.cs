namespace MatchedSuite.Study.Matching;

/// <summary>How many rows of the sample sheet have a disposition; over all dispositions they add up to the rows read.</summary>
/// <param name="Disposition">The disposition.</param>
/// <param name="Rows">Number of rows.</param>
public sealed record DispositionCount(Disposition Disposition, int Rows);
