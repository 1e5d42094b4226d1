using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Sets;

/// <summary>Randomisation test within sets: could chance alone have put the roles where they are?</summary>
/// <remarks>
/// <para>Statistic: the sum over sets of mean index − mean reference, endpoint units; under the null hypothesis every assignment of
/// the roles that keeps each set's numbers is as likely as the observed one. Where there are at most 2^20, all are listed and p is
/// their share at least as extreme; else <see cref="TestOptions.Resamples"/> random ones and p = (1 + b)/(1 + B). Two-sided: twice
/// the smaller tail, at most 1. Statistics closer than 1e-9 of the observed one count as equal.</para>
/// <para>Estimate: the statistic over the number of sets. Interval: the shifts of the index role that the same test, with the same
/// assignments, does not reject; its ends are order statistics of the shifts at which an assignment ties with the observed one. An
/// end is infinite where there are too few assignments to reject any shift. No standard error. Covariates are not adjusted for.</para>
/// <para>Sources: Fisher (1935), The Design of Experiments, ch. III; Phipson and Smyth (2010), Statistical Applications in
/// Genetics and Molecular Biology 9(1), 39. Worked through in docs/methods/set-relabel.md.</para>
/// </remarks>
public static class SetRelabel
{
    private const int MostListed = 1 << 20;
    private const double TieShare = 1e-9;

    // Rounding of a sum of differences as large as the bound; also where the observed statistic is near 0.
    private const double RoundingShare = 1e-13;

    /// <summary>Tests one endpoint.</summary>
    /// <param name="sets">The endpoint on its sets.</param>
    /// <param name="options">Sides, confidence, number of resamples and seed.</param>
    /// <param name="scratch">Working memory of this thread.</param>
    /// <returns><see cref="Outcome.NothingDiffers"/> where no value differs within its set.</returns>
    public static TestResult Run(in SetSample sets, TestOptions options, Scratch scratch)
    {
        Require.OpenUnitInterval(options.Confidence);
        ArgumentOutOfRangeException.ThrowIfLessThan(options.Resamples, 1);
        Remarks remarks = sets.CovariateCount > 0 ? Remarks.Unadjusted : Remarks.None;
        if (sets.Sets == 0)
            return TestResult.Untested(Outcome.TooFewSets, 0, 0, remarks);
        using Scratch.Frame frame = scratch.Open();
        var relabelings = new Relabelings(sets, MostListed, options.Resamples, frame);
        if (relabelings.Bound == 0)
            return TestResult.Untested(Outcome.NothingDiffers, sets.Sets, sets.Members, remarks);
        bool exact = relabelings.Listed > 0;
        if (exact)
            relabelings.List(frame);
        else
            relabelings.Draw(options.Seed, frame);

        // The observed assignment is among those listed; beside random ones it counts as one more.
        int more = exact ? 0 : 1;
        double all = relabelings.Falls.Length + more;
        double tie = (TieShare * Math.Abs(relabelings.Statistic)) + (RoundingShare * relabelings.Bound);
        var (asHigh, asLow) = Count(relabelings, tie);
        Span<double> shifts = Shifts(relabelings, tie);
        int unmoved = relabelings.Falls.Length - shifts.Length + more;
        int place = (int)Math.Ceiling((options.TailShare * all) - unmoved - (RoundingShare * all)) - 1;
        bool found = place >= 0;
        double low = found ? OrderStatistic.At(shifts, place) : double.NegativeInfinity;
        double high = found ? OrderStatistic.At(shifts, shifts.Length - 1 - place) : double.PositiveInfinity;
        return new TestResult
        {
            Sets = sets.Sets,
            Samples = sets.Members,
            Estimate = relabelings.Statistic / sets.Sets,
            Interval = Interval.Pointing(low, high, options.Sides),
            Statistic = relabelings.Statistic,
            P = Tails.ForSides(options.Sides, Probability.Of((asLow + more) / all), Probability.Of((asHigh + more) / all)),
            SmallestPossibleP = Probability.Of(1 / all).Times(options.Sides == Sides.Two ? 2 : 1),
            Remarks = remarks | (exact ? Remarks.Exact : Remarks.Resampled) | (found ? Remarks.None : Remarks.WideAsData),
        };
    }

    private static (int AsHigh, int AsLow) Count(in Relabelings relabelings, double tie)
    {
        int asHigh = 0, asLow = 0;
        foreach (double fall in relabelings.Falls)
        {
            asHigh += fall <= tie ? 1 : 0;
            asLow += fall >= -tie ? 1 : 0;
        }

        return (asHigh, asLow);
    }

    // Shifts at which an assignment ties with the observed one, written over the falls; the observed assignment has none.
    private static Span<double> Shifts(in Relabelings relabelings, double tie)
    {
        int kept = 0;
        for (int i = 0; i < relabelings.Falls.Length; i++)
        {
            if (relabelings.Steps[i] == 0)
                continue;
            double fall = relabelings.Falls[i];
            relabelings.Falls[kept++] = Math.Abs(fall) <= tie ? 0 : fall / relabelings.Steps[i];
        }

        return relabelings.Falls[..kept];
    }
}
