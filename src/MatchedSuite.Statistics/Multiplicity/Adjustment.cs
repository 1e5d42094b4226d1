namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>An adjustment of one family of p-values for being many.</summary>
/// <param name="p">p-values in any order; missing ones are not counted.</param>
/// <param name="adjusted">Receives the adjusted p-values in the same order; missing stays missing.</param>
public delegate void Adjustment(ReadOnlySpan<Probability> p, Span<Probability> adjusted);
