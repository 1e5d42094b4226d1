namespace MatchedSuite.Statistics.Tests.Visits;

/// <summary>Equality of doubles up to a relative difference.</summary>
internal static class Close
{
    public static void To(double expected, double actual, double relative, double absolute = 0)
    {
        if (expected.Equals(actual))
            return;
        double allowed = relative * Math.Max(Math.Abs(expected), Math.Abs(actual)) + absolute;
        Assert.True(Math.Abs(expected - actual) <= allowed, $"expected {expected:R}, found {actual:R}, allowed {allowed:G3}");
    }
}
