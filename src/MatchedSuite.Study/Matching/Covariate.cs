namespace MatchedSuite.Study.Matching;

/// <summary>One column that results are adjusted for.</summary>
/// <param name="Name">Name of the sheet's column, with the category where it stands for one.</param>
/// <param name="Values">One number for each used sample; NaN where missing.</param>
public sealed record Covariate(string Name, double[] Values);
