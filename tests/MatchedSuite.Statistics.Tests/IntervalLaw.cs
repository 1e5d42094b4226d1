namespace MatchedSuite.Statistics.Tests;

/// <summary>The law of every interval that inverts its test: it excludes zero exactly when p &lt; 1 − confidence.</summary>
internal static class IntervalLaw
{
    // Where p equals 1 − confidence to rounding, the last bit decides on which side either falls; nothing is asked there.
    private const double Rounding = 1e-9;

    /// <summary>Asks the law of one result.</summary>
    public static void Holds(double p, Interval interval, double confidence)
    {
        if (Math.Abs(p - (1 - confidence)) > Rounding)
            Assert.Equal(p < 1 - confidence, !interval.Contains(0));
    }
}
