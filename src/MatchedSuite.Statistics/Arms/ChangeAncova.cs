using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Arms;

/// <summary>Analysis of covariance: do the arms differ at follow-up among subjects with the same baseline?</summary>
/// <remarks>
/// <para>Follow-up is regressed on baseline and arm by least squares, n − 3 degrees of freedom. The estimate is the same
/// whether follow-up or change is regressed. Effect size: estimate over the residual standard deviation, times Hedges'
/// correction.</para>
/// <para>Assumes independent subjects, parallel straight lines in both arms and near-normal residuals; in trials with random
/// arms it is at least as powerful as the comparison of changes and free of their dependence on baseline.</para>
/// <para>Sources: Fisher (1932), Statistical Methods for Research Workers, 4th edition; Vickers &amp; Altman (2001), BMJ 323,
/// 1123-1124. Worked through in docs/methods/change-ancova.md.</para>
/// </remarks>
public static class ChangeAncova
{
    // A baseline whose spread within arms is this small beside its size is constant.
    private const double FlatRatio = 1e-14;

    /// <summary>Tests one endpoint; at least two subjects an arm are needed.</summary>
    public static TestResult Run(in ArmSample sample, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        int n = sample.Count;
        var fit = Fit(sample, scratch);
        if (fit.Outcome != Outcome.Tested)
            return TestResult.Untested(fit.Outcome, n, 2 * n);
        return StudentTest.Of(fit.ArmEffect, fit.ArmError, fit.DegreesOfFreedom, options) with
        {
            Sets = n,
            Samples = 2 * n,
            EffectSize = HedgesCorrection.Factor(fit.DegreesOfFreedom) * fit.ArmEffect / fit.ResidualDeviation,
        };
    }

    /// <summary>All coefficients of one endpoint.</summary>
    /// <returns><see cref="Outcome.Collinear"/> where baseline does not vary within the arms.</returns>
    public static ChangeAncovaFit Fit(in ArmSample sample, Scratch scratch)
    {
        int first = sample.IndexCount, n = sample.Count;
        if (Math.Min(first, sample.ReferenceCount) < TwoSampleT.Fewest)
            return Untested(Outcome.TooFewSets, n);
        using var frame = scratch.Open();
        Span<double> baseline = frame.Doubles(n), followUp = frame.Doubles(n);
        var before = CentreByArm(sample.Pairs.Reference, first, baseline);
        var after = CentreByArm(sample.Pairs.Index, first, followUp);

        double squares = Products(baseline, baseline);
        double size = FixedLanes.Largest(sample.Pairs.Reference) - Math.Min(0, FixedLanes.Smallest(sample.Pairs.Reference));
        if (squares <= n * FlatRatio * FlatRatio * size * size)
            return Untested(Outcome.Collinear, n);
        double slope = Products(baseline, followUp) / squares;
        for (int i = 0; i < n; i++)
            followUp[i] -= slope * baseline[i];
        double deviation = Math.Sqrt(Products(followUp, followUp) / (n - 3));
        if (deviation <= FixedLanes.Largest(sample.Pairs.Roundings))
            return Untested(Outcome.NoVariation, n);

        double apart = before.Index - before.Reference;
        double error = deviation * Math.Sqrt(1.0 / first + 1.0 / (n - first) + apart * apart / squares);
        return new ChangeAncovaFit(
            Outcome.Tested, n, after.Index - after.Reference - slope * apart, error, slope, deviation / Math.Sqrt(squares),
            after.Origin + after.Reference - slope * (before.Origin + before.Reference), deviation);
    }

    // Means are kept relative to one value, so that a large common level takes no digit from their difference.
    private static (double Origin, double Index, double Reference) CentreByArm(ReadOnlySpan<double> values, int first, Span<double> centred)
    {
        double origin = values[0];
        for (int i = 0; i < values.Length; i++)
            centred[i] = values[i] - origin;
        return (origin, Centre(centred[..first]), Centre(centred[first..]));
    }

    private static double Centre(Span<double> values)
    {
        double mean = FixedLanes.Sum(values) / values.Length;
        foreach (ref double value in values)
            value -= mean;
        return mean;
    }

    private static double Products(ReadOnlySpan<double> left, ReadOnlySpan<double> right)
    {
        double sum = 0;
        for (int i = 0; i < left.Length; i++)
            sum += left[i] * right[i];
        return sum;
    }

    private static ChangeAncovaFit Untested(Outcome outcome, int n) =>
        new(outcome, n, double.NaN, double.NaN, double.NaN, double.NaN, double.NaN, double.NaN);
}
