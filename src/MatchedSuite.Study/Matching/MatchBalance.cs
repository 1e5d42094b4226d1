namespace MatchedSuite.Study.Matching;

/// <summary>How well the used sets match on one variable.</summary>
/// <remarks>Several samples in one place of a set count as one: their mean, or their category where they agree.</remarks>
/// <param name="Column">Name of the column.</param>
/// <param name="Promise">What was promised: <c>within 2</c>, <c>equal</c>.</param>
/// <param name="Sets">Used sets in which both sides are known.</param>
/// <param name="Unknown">Used sets in which a side is missing.</param>
/// <param name="Agreeing">Sets in which both sides have the same cell text or number.</param>
/// <param name="Numbers">Means and differences; null where equality of categories was promised.</param>
public sealed record MatchBalance(string Column, string Promise, int Sets, int Unknown, int Agreeing, NumberBalance? Numbers);
