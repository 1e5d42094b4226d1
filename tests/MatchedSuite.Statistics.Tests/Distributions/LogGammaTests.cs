using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Tests.Distributions;

public class LogGammaTests
{
    [Theory]
    [InlineData(0.5, 0.57236494292470008707)]      // log √π
    [InlineData(1.5, -0.12078223763524522235)]     // log (√π/2)
    [InlineData(1, 0)]
    [InlineData(2, 0)]
    [InlineData(5, 3.1780538303479456196)]         // log 24
    [InlineData(11, 15.104412573075515295)]        // log 10!
    [InlineData(101, 363.73937555556349014)]       // log 100!
    public void Known_values_are_met(double x, double expected) =>
        Assert.Equal(expected, LogGamma.Of(x), 4e-15 * Math.Max(1, Math.Abs(expected)));

    [Fact]
    public void The_recurrence_and_the_doubling_formula_hold()
    {
        for (double x = 0.05; x < 2000; x *= 1.37)
        {
            double scale = 1e-14 * (1 + Math.Abs(LogGamma.Of(2 * x)));
            Assert.Equal(LogGamma.Of(x) + Math.Log(x), LogGamma.Of(x + 1), scale);
            double doubled = LogGamma.Of(x) + LogGamma.Of(x + 0.5) + (2 * x - 1) * Math.Log(2) - 0.5 * Math.Log(Math.PI);
            Assert.Equal(LogGamma.Of(2 * x), doubled, scale);
        }
    }

    [Fact]
    public void Factorials_join_without_a_step_where_the_table_ends()
    {
        for (long n = 1; n < 400; n++)
            Assert.Equal(LogGamma.LogFactorial(n - 1) + Math.Log(n), LogGamma.LogFactorial(n), 1e-14 * (1 + LogGamma.LogFactorial(n)));
        Assert.Equal(0, LogGamma.LogFactorial(0));
    }

    [Fact]
    public void Arguments_without_a_value_throw_and_missing_stays_missing()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => LogGamma.Of(0));
        Assert.Throws<ArgumentOutOfRangeException>(() => LogGamma.LogFactorial(-1));
        Assert.True(double.IsNaN(LogGamma.Of(double.NaN)));
        Assert.Equal(double.PositiveInfinity, LogGamma.Of(double.PositiveInfinity));
    }
}
