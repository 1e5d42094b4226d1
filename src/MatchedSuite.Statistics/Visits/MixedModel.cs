using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.LinearAlgebra;

namespace MatchedSuite.Statistics.Visits;

/// <summary>Linear mixed model with a random intercept a subject: do the visits differ, using every visit there is?</summary>
/// <remarks>
/// <para>y = visits + covariates + subject + error, fitted by restricted maximum likelihood. Subjects may miss visits; an
/// observation enters when its value and covariates are there.</para>
/// <para>Contrasts: t with Satterthwaite's degrees of freedom. Omnibus: Wald's F of all differences between visits over
/// their number; its denominator degrees of freedom after Fai &amp; Cornelius over the eigenvectors of the covariance of
/// orthonormal contrasts, so that neither the order nor the reference of the visits matters.</para>
/// <para>A variance between subjects at its bound 0 gets the remark <see cref="Remarks.SingularFit"/>; the fit is then that
/// of ordinary least squares, with N − p degrees of freedom.</para>
/// <para>Assumes normal subject effects and errors, equal correlation of any two visits, values missing at random.</para>
/// <para>Sources: Laird &amp; Ware (1982), Biometrics 38, 963-974; Satterthwaite (1946), Biometrics Bulletin 2, 110-114;
/// Fai &amp; Cornelius (1996), Journal of Statistical Computation and Simulation 54, 363-378.
/// Worked through in docs/methods/mixed-model.md.</para>
/// </remarks>
public static class MixedModel
{
    /// <summary>The omnibus test of one endpoint: all visits have the same mean. One-sided alternatives do not exist for it.</summary>
    public static TestResult Run(in VisitSample sample, TestOptions options, Scratch scratch)
    {
        using var frame = scratch.Open();
        var fit = Fit(sample, VisitTerm.Means, frame);
        return Omnibus(fit, options, scratch);
    }

    /// <summary>Fits one endpoint.</summary>
    /// <param name="sample">Values, with or without covariates.</param>
    /// <param name="term">How the course over the visits is described.</param>
    /// <param name="frame">Working memory that outlives the fit.</param>
    public static MixedModelFit Fit(in VisitSample sample, VisitTerm term, in Scratch.Frame frame) =>
        RestrictedLikelihood.Maximise(sample, term, frame);

    /// <summary>Tests a weighted sum of fixed effects against 0; its estimate is that sum.</summary>
    /// <param name="fit">A fit.</param>
    /// <param name="weights">Weights of the leading fixed effects, not all 0; the others weigh 0.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory.</param>
    /// <exception cref="ArgumentException">More weights than fixed effects, or all are 0.</exception>
    public static TestResult Contrast(in MixedModelFit fit, ReadOnlySpan<double> weights, TestOptions options, Scratch scratch)
    {
        if (fit.Outcome != Outcome.Tested)
            return TestResult.Untested(fit.Outcome, fit.Subjects, fit.Observations, fit.Remarks);
        if (weights.Length > fit.Coefficients.Length || weights.IndexOfAnyExcept(0.0) < 0)
            throw new ArgumentException($"A contrast takes 1 to {fit.Coefficients.Length} weights, one of them not 0.", nameof(weights));
        using var frame = scratch.Open();
        Span<double> coded = frame.Doubles(fit.Coefficients.Length);
        fit.Encode(weights, coded);
        double estimate = fit.Estimate(coded), scale = fit.Moments.Scale;
        var contrast = SatterthwaiteContrast.Of(fit, coded, frame.Doubles(coded.Length));
        return StudentTest.Of(estimate, scale * Math.Sqrt(contrast.Variance), contrast.DegreesOfFreedom, options) with
        {
            Sets = fit.Subjects,
            Samples = fit.Observations,
            EffectSize = estimate / (scale * Math.Sqrt(fit.ScaledWithin * (1 + fit.VarianceRatio))),
            Remarks = fit.Remarks,
        };
    }

    /// <summary>Tests the difference of two visits, <paramref name="index"/> minus <paramref name="reference"/>, in a fit with a mean a visit.</summary>
    /// <exception cref="ArgumentException">The fit has no visit means, or the visits are the same.</exception>
    public static TestResult Difference(in MixedModelFit fit, int index, int reference, TestOptions options, Scratch scratch)
    {
        if (fit.Outcome != Outcome.Tested)
            return TestResult.Untested(fit.Outcome, fit.Subjects, fit.Observations, fit.Remarks);
        RequireMeans(fit);
        using var frame = scratch.Open();
        Span<double> weights = frame.Doubles(fit.Times.Length);
        weights.Clear();
        weights[index]++;
        weights[reference]--;
        return Contrast(fit, weights, options, scratch);
    }

    /// <summary>Tests the linear trend: the least-squares slope of the visits' means on their times, or the slope of a fitted line.</summary>
    public static TestResult Trend(in MixedModelFit fit, TestOptions options, Scratch scratch)
    {
        if (fit.Outcome != Outcome.Tested)
            return TestResult.Untested(fit.Outcome, fit.Subjects, fit.Observations, fit.Remarks);
        if (fit.Term == VisitTerm.Line)
            return Contrast(fit, [0, 1], options, scratch);
        using var frame = scratch.Open();
        Span<double> weights = frame.Doubles(fit.Times.Length);
        LinearTrend.Weights(fit.Times, weights);
        return Contrast(fit, weights, options, scratch);
    }

    /// <summary>Tests all visits at once: F over k − 1 and Satterthwaite-type degrees of freedom; the slope alone in a fitted line.</summary>
    public static TestResult Omnibus(in MixedModelFit fit, TestOptions options, Scratch scratch)
    {
        ArgumentNullException.ThrowIfNull(options);
        if (fit.Outcome != Outcome.Tested)
            return TestResult.Untested(fit.Outcome, fit.Subjects, fit.Observations, fit.Remarks);
        using var frame = scratch.Open();
        int count = fit.Coefficients.Length, contrasts = fit.Term == VisitTerm.Line ? 1 : fit.Times.Length - 1;
        Span<double> rows = frame.Doubles(contrasts * count), turned = frame.Doubles(count);
        ContrastRows(fit, contrasts, rows, turned);
        Span<double> covariance = frame.Doubles(PackedSymmetric.Length(contrasts)), vectors = frame.Doubles(contrasts * contrasts);
        for (int a = 0; a < contrasts; a++)
        {
            PackedSymmetric.Multiply(fit.Inverse, rows.Slice(a * count, count), count, turned);
            for (int b = 0; b <= a; b++)
                covariance[PackedSymmetric.At(a, b)] = Dot(rows.Slice(b * count, count), turned);
        }

        JacobiEigen.Decompose(covariance, contrasts, vectors);
        double f = 0, expectation = 0, smallest = double.PositiveInfinity, df = double.NaN;
        Span<double> weights = frame.Doubles(count);
        for (int a = 0; a < contrasts; a++)
        {
            Combine(rows, vectors.Slice(a * contrasts, contrasts), count, weights);
            var one = SatterthwaiteContrast.Of(fit, weights, turned);
            double estimate = fit.Estimate(weights) / fit.Moments.Scale;
            f += estimate * estimate / one.Variance;
            df = one.DegreesOfFreedom;
            smallest = Math.Min(smallest, df);
            expectation += df / (df - 2);
        }

        f /= contrasts;
        if (contrasts > 1)
            df = smallest > 2 ? 2 * expectation / (expectation - contrasts) : smallest;
        return new TestResult
        {
            Sets = fit.Subjects,
            Samples = fit.Observations,
            Statistic = f,
            DegreesOfFreedom = contrasts,
            DenominatorDegreesOfFreedom = df,
            P = FisherF.UpperTail(f, contrasts, df),
            EffectSize = f * contrasts / (f * contrasts + df),
            Remarks = fit.Remarks,
        };
    }

    private static void RequireMeans(in MixedModelFit fit)
    {
        if (fit.Term != VisitTerm.Means)
            throw new ArgumentException("A difference of two visits needs a fit with one mean a visit.", nameof(fit));
    }

    private static void ContrastRows(in MixedModelFit fit, int contrasts, Span<double> rows, Span<double> natural)
    {
        int count = fit.Coefficients.Length;
        for (int a = 0; a < contrasts; a++)
        {
            natural.Clear();
            if (fit.Term == VisitTerm.Line)
                natural[1] = 1;
            else
                HelmertContrasts.Fill(a, natural);
            fit.Encode(natural, rows.Slice(a * count, count));
        }
    }

    private static void Combine(ReadOnlySpan<double> rows, ReadOnlySpan<double> shares, int count, Span<double> weights)
    {
        weights.Clear();
        for (int a = 0; a < shares.Length; a++)
        {
            for (int i = 0; i < count; i++)
                weights[i] += shares[a] * rows[a * count + i];
        }
    }

    private static double Dot(ReadOnlySpan<double> left, ReadOnlySpan<double> right)
    {
        double sum = 0;
        for (int i = 0; i < left.Length; i++)
            sum += left[i] * right[i];
        return sum;
    }
}
