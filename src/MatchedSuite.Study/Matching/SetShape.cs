namespace MatchedSuite.Study.Matching;

/// <summary>How many sets have the same number of samples in each role, before a set is judged complete.</summary>
/// <param name="Index">Samples in the index role.</param>
/// <param name="Reference">Samples in the reference role.</param>
/// <param name="Sets">Number of sets of that shape.</param>
public sealed record SetShape(int Index, int Reference, int Sets);
