using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Tests.Distributions;

public class TailsTests
{
    private static readonly Probability Lower = Probability.Of(0.98);
    private static readonly Probability Upper = Probability.Of(0.03);

    [Fact]
    public void Each_direction_takes_its_tail_and_two_sides_double_the_smaller()
    {
        Assert.Equal(Upper, Tails.ForSides(Sides.Greater, Lower, Upper));
        Assert.Equal(Lower, Tails.ForSides(Sides.Less, Lower, Upper));
        Assert.Equal(0.06, Tails.ForSides(Sides.Two, Lower, Upper).Value, 1e-16);
        Assert.Equal(0.06, Tails.ForSides(Sides.Two, Upper, Lower).Value, 1e-16);
    }

    [Fact]
    public void Two_sides_never_exceed_one_and_keep_the_logarithm_of_tiny_tails()
    {
        Assert.Equal(Probability.One, Tails.ForSides(Sides.Two, Probability.Of(0.6), Probability.Of(0.7)));
        Probability two = Tails.ForSides(Sides.Two, Probability.One, Probability.FromLog10(-1000));
        Assert.Equal(-1000 + Math.Log10(2), two.Log10, 1e-12);
    }

    [Fact]
    public void A_missing_tail_makes_a_missing_answer()
    {
        Assert.True(Tails.ForSides(Sides.Two, Probability.Missing, Upper).IsMissing);
        Assert.True(Tails.ForSides(Sides.Two, Lower, Probability.Missing).IsMissing);
    }
}
