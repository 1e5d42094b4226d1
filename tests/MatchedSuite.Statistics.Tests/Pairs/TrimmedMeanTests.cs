using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class TrimmedMeanTests
{
    [Fact]
    public void Fewer_than_five_pairs_lose_none_and_give_the_paired_t()
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var pairs = PairSample.Of([1.5, 2, -0.5, 3], new double[4], frame);
        var (trimmed, plain) = (TrimmedMean.Run(pairs, TestOptions.Default, scratch), PairedT.Run(pairs, TestOptions.Default, scratch));
        Assert.Equal(plain.Estimate, trimmed.Estimate);
        Assert.Equal(plain.P.Value, trimmed.P.Value, tolerance: 1e-15);
        Assert.Equal(plain.DegreesOfFreedom, trimmed.DegreesOfFreedom);
    }

    [Fact]
    public void A_fifth_of_wild_values_on_either_side_changes_nothing()
    {
        double[] tame = [9, 1, 2, 3, 4, 5, 6, 7, 8, -1];
        double[] wild = [9e9, 1, 2, 3, 4, 5, 6, 7, 1e12, -1e15];
        // Of ten, two are cut at either end: 8 and 9 above, −1 and 1 below.
        Assert.Equal(Run(tame), Run(wild));
        Assert.Equal(4.5, Run(tame).Estimate);
        Assert.Equal(5, Run(tame).DegreesOfFreedom);
    }

    [Fact]
    public void Equal_differences_in_the_middle_have_no_variation_whatever_is_cut_off()
    {
        Assert.Equal(Outcome.NoVariation, Run([-7, 1, 1, 1, 8]).Outcome);
        Assert.Equal(Outcome.NoVariation, Run([1, 1, 1]).Outcome);
        Assert.Equal(Outcome.TooFewSets, Run([1]).Outcome);
    }

    [Theory]
    [InlineData(1e250)]
    [InlineData(1e-250)]
    public void Units_near_the_ends_of_the_doubles_leave_t_alone(double unit)
    {
        double[] values = [9, 1, 2.5, 3, 4, 5, 6, 7, 8, -1];
        Assert.Equal(Run(values).Statistic, Run([.. values.Select(v => v * unit)]).Statistic, tolerance: 1e-12);
    }

    private static TestResult Run(double[] differences)
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return TrimmedMean.Run(PairSample.Of(differences, new double[differences.Length], frame), TestOptions.Default, scratch);
    }
}
