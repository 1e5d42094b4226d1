namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Confidence of each of m intervals so that all of them hold together with the confidence asked for.</summary>
/// <remarks>
/// <para>Bonferroni's 1 − alpha/m holds under any dependence; an endpoint's interval excludes the null exactly when its
/// Bonferroni-adjusted p is below alpha.</para>
/// <para>Source: Dunn (1961), J Am Stat Assoc 56, 52-64. Worked through in docs/methods/simultaneous-intervals.md.</para>
/// </remarks>
public static class SimultaneousLevel
{
    /// <summary>The confidence of every single interval.</summary>
    /// <param name="intervals">m, at least 1.</param>
    /// <param name="confidence">The confidence of all together, strictly between 0 and 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">A number is out of range.</exception>
    public static double Confidence(int intervals, double confidence)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(intervals);
        Require.OpenUnitInterval(confidence);
        return 1 - (1 - confidence) / intervals;
    }
}
