using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Visits;

/// <summary>Page's trend test: do subjects' values tend to rise in the order of the visits?</summary>
/// <remarks>
/// <para>Only subjects seen at every visit enter. L weighs the rank sums by the place of the visit; its null distribution is
/// that of all rearrangements of the observed midranks within subjects, followed exactly in small tables (see
/// <see cref="PageNull.Covers"/>), else normal with the variance that the ties leave. Greater means rising.</para>
/// <para>Statistic: L. Effect size: mean Spearman correlation with the order. Assumes independent subjects.</para>
/// <para>Source: Page (1963), Journal of the American Statistical Association 58, 216-230.
/// Worked through in docs/methods/page-trend.md.</para>
/// </remarks>
public static class PageTrend
{
    /// <summary>Tests one endpoint.</summary>
    public static TestResult Run(in VisitSample sample, TestOptions options, Scratch scratch)
    {
        ArgumentNullException.ThrowIfNull(options);
        var fit = Fit(sample, scratch);
        int samples = fit.Subjects * fit.Visits;
        var ties = fit.HasTies ? Remarks.Ties : Remarks.None;
        if (fit.Outcome != Outcome.Tested)
            return TestResult.Untested(fit.Outcome, fit.Subjects, samples, ties);
        bool exact = !fit.ExactUpper.IsMissing;
        return new TestResult
        {
            Sets = fit.Subjects,
            Samples = samples,
            Statistic = fit.L,
            P = exact
                ? Tails.ForSides(options.Sides, fit.ExactLower, fit.ExactUpper)
                : Tails.ForSides(options.Sides, fit.NormalLower, fit.NormalUpper),
            EffectSize = fit.MeanSpearman,
            Remarks = ties | (exact ? Remarks.Exact : Remarks.None),
        };
    }

    /// <summary>The statistic with all that goes with it.</summary>
    public static PageTrendFit Fit(in VisitSample sample, Scratch scratch)
    {
        using var frame = scratch.Open();
        var complete = sample.Complete(frame);
        int n = complete.Subjects, k = complete.Visits;
        if (n < 2)
            return new PageTrendFit(Outcome.TooFewSets, n, k, false, double.NaN, double.NaN, Probability.Missing, Probability.Missing);
        var ranks = WithinSubjectRanks.Of(complete, frame);
        long spread = 0, doubled = 0;
        for (int i = 0; i < n; i++)
        {
            spread += ranks.SpreadOf(i);
            doubled += PageNull.DoubledL(ranks.Subject(i));
        }

        if (spread == 0)
            return new PageTrendFit(Outcome.NothingDiffers, n, k, true, double.NaN, double.NaN, Probability.Missing, Probability.Missing);

        // Var L = Σ over subjects of Σ(j − j̄)²·Σ(r − r̄)²/(k − 1), and Σ(j − j̄)² = k(k² − 1)/12; the spread is 4Σ(r − r̄)².
        double deviation = Math.Sqrt(k * (k + 1.0) * spread / 48);
        var (lower, upper) = PageNull.Covers(n, k)
            ? PageNull.Tails(ranks, doubled, scratch)
            : (Probability.Missing, Probability.Missing);
        return new PageTrendFit(Outcome.Tested, n, k, ranks.HasTies, doubled / 2.0, deviation, lower, upper);
    }
}
