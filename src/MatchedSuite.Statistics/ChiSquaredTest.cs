using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics;

/// <summary>A chi-squared statistic with its degrees of freedom and upper tail.</summary>
/// <param name="Statistic">The statistic; NaN where it is not defined.</param>
/// <param name="DegreesOfFreedom">Degrees of freedom.</param>
/// <param name="P">Probability of a statistic at least as large under the null hypothesis.</param>
public readonly record struct ChiSquaredTest(double Statistic, double DegreesOfFreedom, Probability P)
{
    /// <summary>No test.</summary>
    public static ChiSquaredTest None { get; } = new(double.NaN, double.NaN, Probability.Missing);

    /// <summary>Refers a statistic to its distribution; one that rounding left below 0 counts as 0.</summary>
    public static ChiSquaredTest Of(double statistic, int degreesOfFreedom) =>
        new(Math.Max(0, statistic), degreesOfFreedom, ChiSquared.UpperTail(Math.Max(0, statistic), degreesOfFreedom));
}
