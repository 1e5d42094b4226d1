using MatchedSuite.Statistics.Multiplicity.Resampling;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class SignedRankScoresTests
{
    [Fact]
    public void Ties_of_the_decimals_share_a_midrank_and_zeros_have_none()
    {
        // Differences 0.67, -0.67 (as decimals), 0, 2, -0.1: midranks 2.5, 2.5, none, 4, 1.
        double[] scores = Scores([1.94, 1.35, 3.3, 4, 1.1], [1.27, 2.02, 3.3, 2, 1.2]);
        Assert.Equal([5, -5, 0, 8, -2], scores);
    }

    [Fact]
    public void All_flips_of_the_scores_give_the_exact_signed_rank_p_value()
    {
        // Hollander and Wolfe (1973), p. 27: depression scores; exact two-sided p 0.0390625.
        double[] scores = Scores(
            [1.83, 0.50, 1.62, 2.48, 1.68, 1.88, 1.55, 3.06, 1.30], [0.878, 0.647, 0.598, 2.05, 1.06, 1.29, 1.06, 3.14, 1.29]);
        var result = MaxT.Run(new DifferenceTable(scores, 9), new ResamplingOptions { Statistic = FlipStatistic.Score });
        Assert.True(result.Exhaustive);
        Assert.Equal(0.0390625, result.StepDown[0].Value, 1e-15);
    }

    private static double[] Scores(double[] index, double[] reference)
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var scores = new double[index.Length];
        SignedRankScores.Of(PairSample.Of(index, reference, frame), scores, scratch);
        return scores;
    }
}
