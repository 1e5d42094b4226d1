namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>Confidence of the intervals of selected endpoints so that, of all intervals shown, the expected share that miss is at most q.</summary>
/// <remarks>
/// <para>Confidence 1 − R·q/m for R discoveries among m tested: 1 − q when all are discoveries, near Bonferroni's when few are.
/// With Benjamini and Hochberg at q as the selection, an endpoint is a discovery exactly when its interval excludes the null.</para>
/// <para>Source: Benjamini and Yekutieli (2005), J Am Stat Assoc 100, 71-81. Worked through in docs/methods/false-coverage.md.</para>
/// </remarks>
public static class FalseCoverage
{
    /// <summary>The confidence of every discovery's marginal interval.</summary>
    /// <param name="discoveries">R, at least 1: without a discovery there is no interval to show.</param>
    /// <param name="tested">m, at least R.</param>
    /// <param name="rate">q, strictly between 0 and 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">A number is out of range.</exception>
    public static double Confidence(int discoveries, int tested, double rate)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(discoveries);
        ArgumentOutOfRangeException.ThrowIfLessThan(tested, discoveries);
        Require.OpenUnitInterval(rate);
        return 1 - discoveries * rate / tested;
    }
}
