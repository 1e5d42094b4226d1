namespace MatchedSuite.Study.Matching;

/// <summary>A gate of the study file that the data break: the run ends with exit code 3.</summary>
/// <param name="Gate">Key in the section <c>gates</c>.</param>
/// <param name="Found">What the data show.</param>
/// <param name="Allowed">What the study file allows.</param>
public sealed record BrokenGate(string Gate, string Found, string Allowed);
