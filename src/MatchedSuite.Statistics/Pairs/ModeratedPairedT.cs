namespace MatchedSuite.Statistics.Pairs;

/// <summary>Moderated paired t-test: is the mean difference zero, its variance steadied by that of the other endpoints?</summary>
/// <remarks>
/// <para>Two stages. While endpoints stream by, each gives a paired t and through <see cref="VarianceOf"/> its variance; then
/// <see cref="VariancePrior.Fit"/> learns the common variance of a family, and <see cref="Finish(in TestResult, VariancePrior?, TestOptions)"/>
/// gives the result: mean / (s̃/√n), s̃² the shrunk variance, df + d0 degrees of freedom.</para>
/// <para>Estimate is that of the paired t; standard error, interval, statistic and p use s̃. Effect size: mean / s̃ times Hedges'
/// correction for df + d0.</para>
/// <para>Assumes independent pairs, near-normal differences, and variances that come from one scaled inverse chi-squared population: endpoints
/// of one kind of assay on one scale.</para>
/// <para>Source: Smyth (2004), Statistical Applications in Genetics and Molecular Biology 3:3. Worked through in
/// docs/methods/moderated-paired-t.md.</para>
/// </remarks>
public static class ModeratedPairedT
{
    /// <summary>Variance of an endpoint's differences for the fit; NaN where the paired t was not tested or doubles cannot hold a square of its unit.</summary>
    public static double VarianceOf(in TestResult pairedT)
    {
        double variance = Squared(pairedT);
        return variance > 0 && double.IsFinite(variance) ? variance : double.NaN;
    }

    /// <summary>The result of one endpoint from its paired t.</summary>
    /// <param name="pairedT">What <see cref="PairedT"/> found; where it was not tested its reason stays.</param>
    /// <param name="prior">What <see cref="VariancePrior.Fit"/> learnt from the family; null where the endpoints were too few.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <returns><see cref="Outcome.TooFewEndpoints"/> without a prior.</returns>
    public static TestResult Finish(in TestResult pairedT, VariancePrior? prior, TestOptions options)
    {
        if (pairedT.Outcome != Outcome.Tested)
            return pairedT;
        return prior is { } known
            ? Finish(pairedT.Estimate, Squared(pairedT), pairedT.DegreesOfFreedom, pairedT.Sets, known, options)
                with { Remarks = pairedT.Remarks }
            : TestResult.Untested(Outcome.TooFewEndpoints, pairedT.Sets, pairedT.Samples, pairedT.Remarks);
    }

    /// <summary>The result of one endpoint from its summary.</summary>
    /// <param name="mean">Mean difference, endpoint unit.</param>
    /// <param name="variance">Variance of the differences.</param>
    /// <param name="degreesOfFreedom">Its degrees of freedom, greater than 0.</param>
    /// <param name="pairs">Number of pairs.</param>
    /// <param name="prior">The common variance.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <exception cref="ArgumentOutOfRangeException">The confidence is out of range or the degrees of freedom are not positive.</exception>
    public static TestResult Finish(
        double mean, double variance, double degreesOfFreedom, int pairs, VariancePrior prior, TestOptions options)
    {
        Require.OpenUnitInterval(options.Confidence);
        Require.Positive(degreesOfFreedom);
        double deviation = Math.Sqrt(prior.Shrink(variance, degreesOfFreedom));
        double df = degreesOfFreedom + prior.DegreesOfFreedom;
        return StudentTest.Of(mean, deviation / Math.Sqrt(pairs), df, options) with
        {
            Sets = pairs,
            Samples = 2 * pairs,
            EffectSize = HedgesCorrection.Factor(df) * mean / deviation,
        };
    }

    private static double Squared(in TestResult pairedT) => pairedT.Sets * pairedT.StandardError * pairedT.StandardError;
}
