using System.Globalization;
using MatchedSuite.Engine.Tables;
using MatchedSuite.Statistics;

namespace MatchedSuite.Engine.Tests.Tables;

public class PValueTextTests
{
    [Theory]
    [InlineData("1e-400", -400)]
    [InlineData("0.5E-400", -400.3010299956639812)]
    [InlineData("2.5e-1000", -999.6020599913279624)]
    [InlineData("1234567890123456789012345e-500", -475.9084850227873)]
    [InlineData("1e-320", -320)]
    [InlineData("0.03", -1.5228787452803376)]
    public void The_logarithm_is_that_of_the_written_number(string text, double log10)
    {
        Assert.Equal(PValueFault.None, PValueText.Read(text, out Probability p));
        Assert.Equal(log10, p.Log10, 1e-11);
    }

    [Fact]
    public void Zeros_before_the_first_digit_count()
    {
        Assert.Equal(PValueFault.None, PValueText.Read("0." + new string('0', 399) + "5", out Probability p));
        Assert.Equal(Math.Log10(5) - 400, p.Log10, 1e-12);
    }

    [Theory]
    [InlineData("")]
    [InlineData("1e")]
    [InlineData("p")]
    [InlineData("1,5")]
    [InlineData("0x1")]
    [InlineData("NaN")]
    [InlineData("1e400")]
    public void What_is_no_finite_number_is_not_read(string text) => Assert.Equal(PValueFault.NotANumber, PValueText.Read(text, out _));

    [Fact]
    public void What_is_written_reads_back()
    {
        for (int i = 0; i <= 5000; i++)
        {
            Probability p = Probability.FromLog10(-0.2 * i);
            Assert.Equal(PValueFault.None, PValueText.Read(PValueText.Of(p), out Probability again));
            Assert.Equal(p.Log10, again.Log10, 1e-11);
            if (p.Value > 1e-290)
                Assert.Equal(p.Value, double.Parse(PValueText.Of(p), CultureInfo.InvariantCulture));
        }

        Assert.Equal("0", PValueText.Of(Probability.Zero));
        Assert.Equal("", PValueText.Of(Probability.Missing));
        Assert.Equal(PValueFault.None, PValueText.Read("0.0", out Probability zero));
        Assert.Equal(Probability.Zero, zero);
    }
}
