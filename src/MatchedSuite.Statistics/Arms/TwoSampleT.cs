using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Arms;

/// <summary>Compares the means of two independent columns by t, with variances of their own or one in common.</summary>
/// <remarks>
/// Effect size of both: difference over the pooled standard deviation, times Hedges' correction for n₁ + n₂ − 2 degrees of
/// freedom. Sources: Student (1908), Biometrika 6, 1-25; Welch (1947), Biometrika 34, 28-35.
/// </remarks>
internal static class TwoSampleT
{
    /// <summary>Fewest values of each column.</summary>
    public const int Fewest = 2;

    /// <summary>Variances may differ; Welch's degrees of freedom.</summary>
    /// <param name="index">At least two values.</param>
    /// <param name="reference">At least two values; the estimate is index minus reference.</param>
    /// <param name="rounding">A standard deviation up to this size is what rounding leaves.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory.</param>
    public static TestResult Welch(
        ReadOnlySpan<double> index, ReadOnlySpan<double> reference, double rounding, TestOptions options, Scratch scratch)
    {
        var moments = Moments.Of(index, reference, scratch);
        if (moments.AreFlat(rounding))
            return TestResult.Untested(Outcome.NoVariation, index.Length + reference.Length, 0);
        double first = moments.IndexDeviation * moments.IndexDeviation / index.Length;
        double second = moments.ReferenceDeviation * moments.ReferenceDeviation / reference.Length;
        double share = first / (first + second);
        double df = 1 / (share * share / (index.Length - 1) + (1 - share) * (1 - share) / (reference.Length - 1));
        return StudentTest.Of(moments.Difference, Math.Sqrt(first + second), df, options) with { EffectSize = moments.EffectSize };
    }

    /// <summary>One variance in common; n₁ + n₂ − 2 degrees of freedom. Parameters as in <see cref="Welch"/>.</summary>
    public static TestResult Pooled(
        ReadOnlySpan<double> index, ReadOnlySpan<double> reference, double rounding, TestOptions options, Scratch scratch)
    {
        var moments = Moments.Of(index, reference, scratch);
        if (moments.AreFlat(rounding))
            return TestResult.Untested(Outcome.NoVariation, index.Length + reference.Length, 0);
        double error = moments.PooledDeviation * Math.Sqrt(1.0 / index.Length + 1.0 / reference.Length);
        return StudentTest.Of(moments.Difference, error, moments.DegreesOfFreedom, options) with { EffectSize = moments.EffectSize };
    }

    private readonly record struct Moments(double Difference, double IndexDeviation, double ReferenceDeviation, double PooledDeviation, int DegreesOfFreedom)
    {
        public double EffectSize => HedgesCorrection.Factor(DegreesOfFreedom) * Difference / PooledDeviation;

        public bool AreFlat(double rounding) => Math.Max(IndexDeviation, ReferenceDeviation) <= rounding;

        public static Moments Of(ReadOnlySpan<double> index, ReadOnlySpan<double> reference, Scratch scratch)
        {
            var (indexMean, indexDeviation) = MeanAndDeviation.Of(index, scratch);
            var (referenceMean, referenceDeviation) = MeanAndDeviation.Of(reference, scratch);
            int df = index.Length + reference.Length - 2;
            double squares = (index.Length - 1) * indexDeviation * indexDeviation
                + (reference.Length - 1) * referenceDeviation * referenceDeviation;
            return new Moments(indexMean - referenceMean, indexDeviation, referenceDeviation, Math.Sqrt(squares / df), df);
        }
    }
}
