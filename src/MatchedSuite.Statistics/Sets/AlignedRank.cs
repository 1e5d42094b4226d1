using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Sets;

/// <summary>Aligned rank test: do the roles differ within sets, whatever the shape of the distribution?</summary>
/// <remarks>
/// <para>Every value is centred on its set's mean, all are ranked together (midranks, decimal ties), and the index role's rank
/// sum is referred to its mean and variance over all relabelings within sets. Statistic: the standardised sum, normal, without
/// continuity correction.</para>
/// <para>Estimate and interval invert the test: the shift that, taken off the index role, makes the rank sum equal its mean
/// (the middle of all such shifts), and the shifts that the test does not reject; so the interval excludes 0 exactly when
/// p &lt; 1 − confidence. They are found to 1e-12 of the range of the centred values, endpoint units. An end is infinite where no shift
/// is rejected. No standard error. Covariates are not adjusted for.</para>
/// <para>Assumes independent sets, roles exchangeable within a set under the null hypothesis, a common shift under the
/// alternative, and some dozen members at least for the normal reference.</para>
/// <para>Source: Hodges and Lehmann (1962), Annals of Mathematical Statistics 33(2), 482-497. Worked through in
/// docs/methods/aligned-rank.md.</para>
/// </remarks>
public static class AlignedRank
{
    // The statistic of equal halves is 0 but for rounding; it is a sum of few-digit fractions.
    private const double Zero = 1e-11;
    private const double RelativeWidth = 1e-12;
    private const int MostSteps = 400;
    private const int Forwards = 1;
    private const int Backwards = -1;

    // The search for a bracket starts at this part of the farthest shift and doubles.
    private const double FirstReach = 64;

    // Guesses are bracketed by this share of the width on both sides.
    private const double GuessMargin = 1.0 / 64;

    /// <summary>Tests one endpoint.</summary>
    /// <param name="sets">The endpoint on its sets.</param>
    /// <param name="options">Sides and confidence.</param>
    /// <param name="scratch">Working memory of this thread.</param>
    /// <returns><see cref="Outcome.NothingDiffers"/> where no value differs from another within its set.</returns>
    public static TestResult Run(in SetSample sets, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        Remarks remarks = sets.CovariateCount > 0 ? Remarks.Unadjusted : Remarks.None;
        if (sets.Sets == 0)
            return TestResult.Untested(Outcome.TooFewSets, 0, 0, remarks);
        using Scratch.Frame frame = scratch.Open();
        var ranks = new AlignedRanks(sets, frame);
        double z = ranks.StandardisedAt(0);
        if (!ranks.Vary)
            return TestResult.Untested(Outcome.NothingDiffers, sets.Sets, sets.Members, remarks);
        remarks |= ranks.Ties ? Remarks.Ties : Remarks.None;

        double quantile = StandardNormal.UpperQuantile(options.TailShare);
        double low = options.Sides == Sides.Less ? double.NegativeInfinity : FirstAtMost(ref ranks, Forwards, z, quantile);
        double high = options.Sides == Sides.Greater ? double.PositiveInfinity : -FirstAtMost(ref ranks, Backwards, -z, quantile);
        bool wide = (options.Sides != Sides.Less && double.IsInfinity(low)) || (options.Sides != Sides.Greater && double.IsInfinity(high));
        return new TestResult
        {
            Sets = sets.Sets,
            Samples = sets.Members,
            Estimate = (FirstAtMost(ref ranks, Forwards, z, Zero) - FirstAtMost(ref ranks, Backwards, -z, Zero)) / 2,
            Interval = new Interval(low, high),
            Statistic = z,
            P = Tails.ForSides(options.Sides, StandardNormal.LowerTail(z), StandardNormal.UpperTail(z)),
            Remarks = remarks | (wide ? Remarks.WideAsData : Remarks.None),
        };
    }

    // The statistic falls with the shift: the smallest shift with a statistic of at most the level. Backwards, roles and shifts are
    // mirrored, so that swapping the roles takes the same steps; where the statistic is not quite monotone, that decides.
    private static double FirstAtMost(ref AlignedRanks ranks, int direction, double atZero, double level)
    {
        var (left, right) = Bracket(ref ranks, direction, atZero, level);
        return double.IsInfinity(left.Shift) ? left.Shift : Narrow(ref ranks, direction, left, right, level).Right;
    }

    // Two shifts, the left with a statistic above the threshold, the right with one at or below it; an end is infinite where none is.
    private static (Point Left, Point Right) Bracket(ref AlignedRanks ranks, int direction, double atZero, double threshold)
    {
        var known = new Point(0, atZero);
        bool above = atZero > threshold;
        for (double reach = ranks.Reach / FirstReach; reach <= ranks.Reach; reach *= 2)
        {
            double shift = above ? reach : -reach;
            var next = new Point(shift, direction * ranks.StandardisedAt(direction * shift));
            if (next.Statistic > threshold != above)
                return above ? (known, next) : (next, known);
            known = next;
        }

        return above ? (known, new Point(double.PositiveInfinity, 0)) : (new Point(double.NegativeInfinity, 0), known);
    }

    private static (double Left, double Right) Narrow(ref AlignedRanks ranks, int direction, Point left, Point right, double threshold)
    {
        double tolerance = RelativeWidth * ranks.Range;
        for (int step = 0; step < MostSteps && right.Shift - left.Shift > tolerance; step++)
        {
            double width = right.Shift - left.Shift;
            double guess = left.Shift + (width * (left.Statistic - threshold) / (left.Statistic - right.Statistic));

            // Every third step halves, so that a statistic far from linear costs no more than three times a bisection.
            double shift = (step % 3) switch
            {
                0 => guess - (GuessMargin * width),
                1 => guess + (GuessMargin * width),
                _ => left.Shift + (width / 2),
            };
            if (!(shift > left.Shift && shift < right.Shift))
                shift = left.Shift + (width / 2);
            var next = new Point(shift, direction * ranks.StandardisedAt(direction * shift));
            if (next.Statistic > threshold)
                left = next;
            else
                right = next;
        }

        return (left.Shift, right.Shift);
    }

    private readonly record struct Point(double Shift, double Statistic);
}
