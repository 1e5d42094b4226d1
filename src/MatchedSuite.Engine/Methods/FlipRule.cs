using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Multiplicity.Resampling;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Engine.Methods;

/// <summary>Gives each complete pair the value whose sign a flip changes.</summary>
public delegate void FlipScores(in PairSample pairs, Span<double> scores, Scratch scratch);

/// <summary>How a method takes part when whole sets are flipped over all endpoints.</summary>
/// <param name="Statistic">What its flipped sums are scaled to.</param>
/// <param name="Scores">The values that are flipped.</param>
public sealed record FlipRule(FlipStatistic Statistic, FlipScores Scores)
{
    /// <summary>The paired t of the differences.</summary>
    public static FlipRule Differences { get; } = new(
        FlipStatistic.T, (in PairSample pairs, Span<double> scores, Scratch scratch) => pairs.Differences.CopyTo(scores));

    /// <summary>The sum of the signed ranks.</summary>
    public static FlipRule SignedRanks { get; } = new(FlipStatistic.Score, SignedRankScores.Of);
}
