namespace MatchedSuite.Statistics.Visits;

/// <summary>Friedman's test: do subjects tend to rank some visits above others?</summary>
/// <remarks>
/// <para>Only subjects seen at every visit enter. Midranks within subjects; the statistic is corrected for ties and compared
/// with χ² on k − 1 degrees of freedom, in tiny tables with all rearrangements of the observed midranks within subjects
/// (see <see cref="FriedmanNull.Covers"/>). The test has no direction: sides are not used.</para>
/// <para>Effect size: Kendall's W. Assumes independent subjects, nothing about shape.</para>
/// <para>Sources: Friedman (1937), Journal of the American Statistical Association 32, 675-701; Kendall &amp; Babington Smith
/// (1939), Annals of Mathematical Statistics 10, 275-287; Iman &amp; Davenport (1980), Communications in Statistics A9, 571-595.
/// Worked through in docs/methods/friedman.md.</para>
/// </remarks>
public static class Friedman
{
    /// <summary>Tests one endpoint.</summary>
    public static TestResult Run(in VisitSample sample, TestOptions options, Scratch scratch)
    {
        var fit = Fit(sample, scratch);
        int samples = fit.Subjects * fit.Visits;
        var ties = fit.HasTies ? Remarks.Ties : Remarks.None;
        if (fit.Outcome != Outcome.Tested)
            return TestResult.Untested(fit.Outcome, fit.Subjects, samples, ties);
        bool exact = !fit.ExactP.IsMissing;
        return new TestResult
        {
            Sets = fit.Subjects,
            Samples = samples,
            Statistic = fit.ChiSquared,
            DegreesOfFreedom = fit.DegreesOfFreedom,
            P = exact ? fit.ExactP : fit.ChiSquaredP,
            EffectSize = fit.KendallW,
            Remarks = ties | (exact ? Remarks.Exact : Remarks.None),
        };
    }

    /// <summary>The statistic with all that goes with it.</summary>
    public static FriedmanFit Fit(in VisitSample sample, Scratch scratch)
    {
        using var frame = scratch.Open();
        var complete = sample.Complete(frame);
        int n = complete.Subjects, k = complete.Visits;
        if (n < 2)
            return new FriedmanFit(Outcome.TooFewSets, n, k, false, double.NaN, Probability.Missing);
        var ranks = WithinSubjectRanks.Of(complete, frame);
        long spread = 0;
        for (int i = 0; i < n; i++)
            spread += ranks.SpreadOf(i);
        if (spread == 0)
            return new FriedmanFit(Outcome.NothingDiffers, n, k, true, double.NaN, Probability.Missing);

        long observed = FriedmanNull.Departure(ranks, frame);
        double statistic = (k - 1) * (double)observed / spread;
        var exact = FriedmanNull.Covers(n, k) ? FriedmanNull.UpperTail(ranks, observed, scratch) : Probability.Missing;
        return new FriedmanFit(Outcome.Tested, n, k, ranks.HasTies, statistic, exact);
    }
}
