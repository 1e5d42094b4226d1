using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Reference.Tests;

/// <summary>
/// Aligned rank test on endometrial cancer (Mack et al. 1976) and infertility (Trichopoulos et al. 1976). Values: base R 4.2.2,
/// rank(round(y - ave(y, set), 9)) with mean and variance over relabelings set by set; limits and estimate from a grid of
/// shifts of step 0.0005 on which the same statistic was evaluated.
/// </summary>
public class AlignedRankTests
{
    private const double GridStep = 0.0005;

    [Theory]
    [InlineData("bdendo", "dur", 57, 5.52127470478265, 3.36549137174297e-08, 1, 1.9045, 1.40025)]
    [InlineData("infert", "spontaneous", 83, 5.58929706603674, 2.27990633080512e-08, 0.3335, 0.6665, 0.66675)]
    [InlineData("bdendo", "age", 63, -0.855977926531454, 0.392009989093436, -0.2, 0, -0.00025)]
    public void Statistic_estimate_and_interval_agree_with_base_R(
        string dataset, string endpoint, int sets, double z, double p, double low, double high, double estimate)
    {
        var scratch = new Scratch();
        using Scratch.Frame frame = scratch.Open();
        TestResult result = AlignedRank.Run(ReferenceSets.Of(dataset, endpoint, frame), TestOptions.Default, scratch);
        Assert.Equal(sets, result.Sets);
        Assert.Equal(z, result.Statistic, 1e-12);
        Assert.Equal(p, result.P.Value, 1e-11 * p);
        Assert.Equal(low, result.Interval.Low, 1.01 * GridStep);
        Assert.Equal(high, result.Interval.High, 1.01 * GridStep);
        Assert.Equal(estimate, result.Estimate, 1.01 * GridStep);
    }
}
