using MatchedSuite.Statistics;

namespace MatchedSuite.Reporting.Tests;

public class NumberTextTests
{
    [Theory]
    [InlineData(0, "0")]
    [InlineData(1.58, "1.580")]
    [InlineData(-0.0735, "-0.07350")]
    [InlineData(123.456, "123.5")]
    [InlineData(12345.6, "12346")]
    [InlineData(0.00012345, "1.235e-4")]
    [InlineData(double.NaN, "–")]
    [InlineData(double.NegativeInfinity, "−∞")]
    public void A_quantity_has_four_significant_digits(double value, string text) => Assert.Equal(text, NumberText.Quantity(value));

    [Theory]
    [InlineData(1, "1.000")]
    [InlineData(0.5, "0.500")]
    [InlineData(0.04999, "0.0500")]
    [InlineData(0.0012, "0.0012")]
    [InlineData(0.00099, "9.9e-4")]
    [InlineData(0.000999999, "1.0e-3")]
    [InlineData(3.2e-17, "3.2e-17")]
    public void A_p_value_is_short_and_never_rounded_to_zero(double value, string text) => Assert.Equal(text, NumberText.P(Probability.Of(value)));

    [Fact]
    public void A_p_value_beyond_the_range_of_doubles_still_shows_its_size() =>
        Assert.Equal("1.0e-400", NumberText.P(Probability.FromLog10(-400)));
}
