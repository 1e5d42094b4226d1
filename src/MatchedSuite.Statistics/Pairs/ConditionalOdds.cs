using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>Exact limits of the log odds of one count against another, given their sum.</summary>
/// <remarks>
/// Given the sum, one count is binomial with these odds. Clopper–Pearson limits of its share become limits of the log odds; each
/// odds is a ratio of a limit for the one to the opposite limit for the other, so none is a difference from 1. Source: Clopper and
/// Pearson (1934), Biometrika 26, 404-413.
/// </remarks>
internal static class ConditionalOdds
{
    /// <summary>Limits of log(first/second); an end is infinite where a count is 0.</summary>
    /// <param name="first">One count, 0 or more.</param>
    /// <param name="second">The other; not both 0.</param>
    /// <param name="tailShare">Probability left outside at one end.</param>
    public static (double Low, double High) Limits(long first, long second, double tailShare)
    {
        var shareOfFirst = Binomial.ExactLimits(first, first + second, tailShare);
        var shareOfSecond = Binomial.ExactLimits(second, first + second, tailShare);
        return (Math.Log(shareOfFirst.Low / shareOfSecond.High), Math.Log(shareOfFirst.High / shareOfSecond.Low));
    }
}
