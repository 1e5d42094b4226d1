using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>Exact comparison of two Poisson rates from paired counts: do events come at the same rate in both roles?</summary>
/// <remarks>
/// <para>x events in person-time t in the index role, y in time u in the reference role, summed over pairs. Given x + y, x is
/// binomial with the share t/(t + u) where the rates are equal. Statistic: x. Two-sided p is twice the smaller tail, at most 1.</para>
/// <para>Estimate: log rate ratio log((x/t)/(y/u)), standard error √(1/x + 1/y); exact conditional limits. Infinite where x or y
/// is 0, and then without a standard error. The interval excludes 0 exactly when p &lt; 1 − confidence.</para>
/// <para>Assumes that a pair's two counts are Poisson with a common factor of the pair, and the same rate ratio in every pair; an
/// excess of variance beyond that makes p too small.</para>
/// <para>Source: Przyborowski and Wilenski (1940), Biometrika 31, 313-323. Worked through in docs/methods/paired-poisson.md.</para>
/// </remarks>
public static class PairedPoisson
{
    /// <summary>Tests one endpoint of counts from samples observed equally long.</summary>
    /// <param name="pairs">The complete pairs.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory of the calling thread; this method needs none.</param>
    /// <returns><see cref="Outcome.TooFewSets"/> without pairs, <see cref="Outcome.NothingDiffers"/> without events.</returns>
    /// <exception cref="ArgumentException">A value is not a whole number, 0 or more.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The confidence is not strictly between 0 and 1.</exception>
    public static TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch) => Run(EventTotals.Of(pairs), options);

    /// <summary>Tests summed events and person-time.</summary>
    /// <param name="totals">Events and person-time of both roles.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <returns><see cref="Outcome.TooFewSets"/> without pairs, <see cref="Outcome.NothingDiffers"/> without events.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The confidence or a person-time is out of range.</exception>
    public static TestResult Run(in EventTotals totals, TestOptions options)
    {
        Require.OpenUnitInterval(options.Confidence);
        int n = totals.Pairs;
        if (n == 0)
            return TestResult.Untested(Outcome.TooFewSets, 0, 0);
        Require.PositiveFinite(totals.IndexTime, nameof(totals));
        Require.PositiveFinite(totals.ReferenceTime, nameof(totals));
        if (totals.Events == 0)
            return TestResult.Untested(Outcome.NothingDiffers, n, 2 * n);

        long x = totals.IndexEvents, y = totals.ReferenceEvents, events = totals.Events;
        double ratioOfTimes = totals.IndexTime / totals.ReferenceTime;
        double share = totals.IndexTime / (totals.IndexTime + totals.ReferenceTime);
        double restShare = totals.ReferenceTime / (totals.IndexTime + totals.ReferenceTime);
        double offset = Math.Log(ratioOfTimes);
        var (low, high) = ConditionalOdds.Limits(x, y, options.TailShare);
        bool isOneSided = x == 0 || y == 0;
        // The tail of the rarer side is taken from its own share, so that swapping the roles changes no digit.
        return new TestResult
        {
            Sets = n,
            Samples = 2 * n,
            Estimate = Math.Log((double)x / y) - offset,
            StandardError = isOneSided ? double.NaN : Math.Sqrt((1.0 / x) + (1.0 / y)),
            Interval = Interval.Pointing(low - offset, high - offset, options.Sides),
            Statistic = x,
            P = Tails.ForSides(options.Sides, Binomial.UpperTail(y, events, restShare), Binomial.UpperTail(x, events, share)),
            SmallestPossibleP = Tails.ForSides(options.Sides, Binomial.Point(events, events, restShare), Binomial.Point(events, events, share)),
            Remarks = Remarks.Exact | (isOneSided ? Remarks.EventsInOneRole : 0),
        };
    }
}
