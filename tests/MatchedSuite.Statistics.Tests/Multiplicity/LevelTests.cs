using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Statistics.Tests.Multiplicity;

public class LevelTests
{
    [Fact]
    public void False_coverage_adjusts_for_the_share_that_was_selected()
    {
        Assert.Equal(0.99, FalseCoverage.Confidence(20, 100, 0.05), 1e-15);
        Assert.Equal(0.95, FalseCoverage.Confidence(100, 100, 0.05), 1e-15);
        Assert.Throws<ArgumentOutOfRangeException>(() => FalseCoverage.Confidence(0, 100, 0.05));
        Assert.Throws<ArgumentOutOfRangeException>(() => FalseCoverage.Confidence(101, 100, 0.05));
    }

    [Fact]
    public void Discoveries_of_the_step_up_are_the_endpoints_whose_adjusted_interval_excludes_the_null()
    {
        Probability[] p = [.. Enumerable.Range(1, 50).Select(i => Probability.Of(Math.Pow(i / 50.0, 3)))];
        var adjusted = PValueVectors.Adjusted(BenjaminiHochberg.Adjust, p);
        int discoveries = adjusted.Count(one => one.IsAtMost(0.1));
        double confidence = FalseCoverage.Confidence(discoveries, p.Length, 0.1);
        Assert.True(discoveries > 0);
        for (int i = 0; i < p.Length; i++)
            Assert.Equal(adjusted[i].IsAtMost(0.1), p[i].Value <= 1 - confidence);
    }

    [Fact]
    public void Simultaneous_intervals_share_the_error()
    {
        Assert.Equal(0.995, SimultaneousLevel.Confidence(10, 0.95), 1e-15);
        Assert.Throws<ArgumentOutOfRangeException>(() => SimultaneousLevel.Confidence(0, 0.95));
    }
}
