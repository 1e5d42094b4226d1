using MatchedSuite.Statistics.LinearAlgebra;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Visits;

/// <summary>Repeated-measures analysis of variance, one factor within subjects: do the visits differ in their means?</summary>
/// <remarks>
/// <para>Only subjects seen at every visit enter. F = mean square of visits over that of visits × subjects, on ε(k − 1) and
/// ε(n − 1)(k − 1) degrees of freedom. The test has no direction: sides are not used.</para>
/// <para>Computed from orthonormal contrasts within subjects, so a level common to all visits loses no digit.</para>
/// <para>Assumes independent subjects and near-normal differences; equal variances of all differences where ε = 1 is taken.</para>
/// <para>Sources: Greenhouse &amp; Geisser (1959), Psychometrika 24, 95-112; Huynh &amp; Feldt (1976), Journal of Educational
/// Statistics 1, 69-82. Worked through in docs/methods/rm-anova.md.</para>
/// </remarks>
public static class RepeatedMeasuresAnova
{
    /// <summary>F with Greenhouse and Geisser's correction.</summary>
    public static TestResult GreenhouseGeisser(in VisitSample sample, TestOptions options, Scratch scratch) =>
        Test(sample, SphericityCorrection.GreenhouseGeisser, scratch);

    /// <summary>F with Huynh and Feldt's correction.</summary>
    public static TestResult HuynhFeldt(in VisitSample sample, TestOptions options, Scratch scratch) =>
        Test(sample, SphericityCorrection.HuynhFeldt, scratch);

    /// <summary>F without correction.</summary>
    public static TestResult Uncorrected(in VisitSample sample, TestOptions options, Scratch scratch) =>
        Test(sample, SphericityCorrection.None, scratch);

    /// <summary>The whole table of one endpoint.</summary>
    public static RepeatedMeasuresAnovaFit Fit(in VisitSample sample, Scratch scratch)
    {
        using var frame = scratch.Open();
        var complete = sample.Complete(frame);
        int n = complete.Subjects, contrasts = complete.Visits - 1;
        if (n < 2)
            return Untested(Outcome.TooFewSets, complete);

        Span<double> rows = frame.Doubles(n * contrasts), mean = frame.Doubles(contrasts);
        Span<double> covariance = frame.Doubles(PackedSymmetric.Length(contrasts));
        HelmertContrasts.Apply(complete.Values, complete.Visits, rows, frame);
        Covariance(rows, contrasts, mean, covariance);
        double trace = 0, meanSquares = 0;
        for (int a = 0; a < contrasts; a++)
        {
            trace += covariance[PackedSymmetric.At(a, a)];
            meanSquares += mean[a] * mean[a];
        }

        double rounding = StudentTest.RoundingOf(Math.Max(FixedLanes.Largest(complete.Values), -FixedLanes.Smallest(complete.Values)));
        if (trace <= contrasts * rounding * rounding)
            return Untested(Outcome.NoVariation, complete);
        // Epsilon and W have no unit: with a trace of 1 no square over- or underflows.
        foreach (ref double element in covariance)
            element /= trace;
        double epsilon = Math.Min(1, 1 / (contrasts * PackedSymmetric.TraceOfProduct(covariance, covariance, contrasts)));
        return new RepeatedMeasuresAnovaFit(
            Outcome.Tested, n, complete.Visits, n * meanSquares, SubjectSquares(complete), (n - 1) * trace,
            epsilon, HuynhFeldt(epsilon, n, contrasts), MauchlySphericity.Of(covariance, contrasts, n, scratch));
    }

    private static TestResult Test(in VisitSample sample, SphericityCorrection correction, Scratch scratch)
    {
        var fit = Fit(sample, scratch);
        int samples = fit.Subjects * fit.Visits;
        if (fit.Outcome != Outcome.Tested)
            return TestResult.Untested(fit.Outcome, fit.Subjects, samples);
        double epsilon = fit.Epsilon(correction);
        return new TestResult
        {
            Sets = fit.Subjects,
            Samples = samples,
            Statistic = fit.F,
            DegreesOfFreedom = epsilon * fit.VisitDegrees,
            DenominatorDegreesOfFreedom = epsilon * fit.ErrorDegrees,
            P = fit.P(correction),
            EffectSize = fit.PartialEtaSquared,
        };
    }

    private static void Covariance(Span<double> rows, int contrasts, Span<double> mean, Span<double> covariance)
    {
        int n = rows.Length / contrasts;
        mean.Clear();
        covariance.Clear();
        for (int at = 0; at < rows.Length; at += contrasts)
        {
            for (int a = 0; a < contrasts; a++)
                mean[a] += rows[at + a];
        }

        for (int a = 0; a < contrasts; a++)
            mean[a] /= n;
        for (int at = 0; at < rows.Length; at += contrasts)
        {
            int to = 0;
            for (int a = 0; a < contrasts; a++)
            {
                double deviation = rows[at + a] -= mean[a];
                for (int b = 0; b <= a; b++)
                    covariance[to++] += deviation * rows[at + b];
            }
        }

        foreach (ref double element in covariance)
            element /= n - 1;
    }

    // With two subjects there is one direction of spread, and ε is its lower bound whatever the data.
    private static double HuynhFeldt(double epsilon, int n, int contrasts)
    {
        double numerator = n * contrasts * epsilon - 2, denominator = contrasts * (n - 1 - contrasts * epsilon);
        if (n == 2)
            return epsilon;
        return denominator > 0 ? numerator / denominator : double.PositiveInfinity;
    }

    private static double SubjectSquares(in VisitSample complete)
    {
        int n = complete.Subjects, k = complete.Visits;
        double origin = complete.Values[0], sum = 0, squares = 0;
        for (int pass = 0; pass < 2; pass++)
        {
            double grand = sum / n;
            for (int i = 0; i < n; i++)
            {
                double mean = 0;
                foreach (double value in complete.Subject(i))
                    mean += (value - origin) / k;
                if (pass == 0)
                    sum += mean;
                else
                    squares += (mean - grand) * (mean - grand);
            }
        }

        return k * squares;
    }

    private static RepeatedMeasuresAnovaFit Untested(Outcome outcome, in VisitSample complete) =>
        new(outcome, complete.Subjects, complete.Visits, double.NaN, double.NaN, double.NaN, double.NaN, double.NaN, MauchlySphericity.None);
}
