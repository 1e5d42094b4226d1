using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Statistics.Tests.Multiplicity;

public class HolmTests
{
    [Fact]
    public void One_hypothesis_keeps_its_p_value_to_the_bit()
    {
        Span<Probability> adjusted = stackalloc Probability[1];
        Holm.Adjust([Probability.Of(0.0371)], adjusted);
        Assert.Equal(Probability.Of(0.0371), adjusted[0]);
    }

    [Fact]
    public void Missing_p_values_stay_missing_and_are_not_counted()
    {
        var adjusted = new Probability[4];
        Holm.Adjust([Probability.Missing, Probability.Of(0.01), Probability.Missing, Probability.Of(0.5)], adjusted);
        Assert.True(adjusted[0].IsMissing);
        Assert.True(adjusted[2].IsMissing);
        Assert.Equal(0.02, adjusted[1].Value);
        Assert.Equal(0.5, adjusted[3].Value);
    }

    [Fact]
    public void P_values_below_the_range_of_doubles_are_adjusted_through_their_logarithms()
    {
        var adjusted = new Probability[3];
        Holm.Adjust([Probability.FromLog10(-1000), Probability.Of(0.5), Probability.FromLog10(-1200)], adjusted);
        Assert.Equal(-1000 + Math.Log10(2), adjusted[0].Log10, 1e-12);
        Assert.Equal(-1200 + Math.Log10(3), adjusted[2].Log10, 1e-12);
        Assert.Equal(0.5, adjusted[1].Value);
    }

    [Fact]
    public void A_hypothesis_of_weight_zero_is_never_rejected_and_costs_the_others_nothing()
    {
        var adjusted = new Probability[3];
        Holm.Adjust([Probability.Of(0.01), Probability.Of(0), Probability.Of(0.02)], [2, 0, 2], adjusted);
        Assert.Equal([0.02, 1, 0.02], Array.ConvertAll(adjusted, a => a.Value));
    }

    [Fact]
    public void A_wrong_length_or_weight_is_refused()
    {
        Assert.Throws<ArgumentException>(() => Holm.Adjust([Probability.One], new Probability[2]));
        Assert.Throws<ArgumentException>(() => Holm.Adjust([Probability.One], [1, 2], new Probability[1]));
        Assert.Throws<ArgumentException>(() => Holm.Adjust([Probability.One], [-1], new Probability[1]));
        Assert.Throws<ArgumentException>(() => Holm.Adjust([Probability.One], [double.NaN], new Probability[1]));
    }
}
