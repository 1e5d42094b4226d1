using CsCheck;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Statistics.Tests.Sets;

public class SetRelabelTests
{
    [Fact]
    public void Both_tails_equal_the_shares_of_every_relabeling_listed() =>
        DrawnSets.AnyShape(1, 4).Sample(sets =>
        {
            TestResult greater = sets.Run(SetRelabel.Run, new TestOptions { Sides = Sides.Greater });
            if (greater.Outcome != Outcome.Tested)
                return;
            double observed = Observed(sets, 0);
            double[] all = Statistics(sets, 0);
            Assert.Equal(observed, greater.Statistic, 1e-9);
            Assert.Equal(observed / sets.Count, greater.Estimate, 1e-9);
            Assert.Equal(all.Count(t => t >= observed - 1e-7) / (double)all.Length, greater.P.Value, 1e-12);
            TestResult less = sets.Run(SetRelabel.Run, new TestOptions { Sides = Sides.Less });
            Assert.Equal(all.Count(t => t <= observed + 1e-7) / (double)all.Length, less.P.Value, 1e-12);
            Assert.Equal(Math.Min(1, 2 * Math.Min(greater.P.Value, less.P.Value)), sets.Run(SetRelabel.Run).P.Value, 1e-12);
        });

    [Fact]
    public void Shifts_just_inside_the_interval_are_not_rejected_and_just_outside_are() =>
        DrawnSets.AnyShape(2, 4).Sample(sets =>
        {
            const double confidence = 0.8;
            TestResult result = sets.Run(SetRelabel.Run, new TestOptions { Confidence = confidence });
            if (result.Outcome != Outcome.Tested)
                return;
            const double step = 1e-5;
            if (double.IsFinite(result.Interval.Low))
            {
                Assert.True(UpperTail(sets, result.Interval.Low + step) >= 0.1 - 1e-12);
                Assert.True(UpperTail(sets, result.Interval.Low - step) < 0.1);
            }

            if (double.IsFinite(result.Interval.High))
            {
                Assert.True(UpperTail(sets.Swapped(), -(result.Interval.High - step)) >= 0.1 - 1e-12);
                Assert.True(UpperTail(sets.Swapped(), -(result.Interval.High + step)) < 0.1);
            }
        });

    [Fact]
    public void The_interval_excludes_zero_exactly_when_p_is_below_one_minus_confidence() =>
        SetLaws.IntervalAgreesWithP(SetRelabel.Run, DrawnSets.AnyShape(1, 5));

    [Fact]
    public void So_it_does_with_random_relabelings() =>
        SetLaws.IntervalAgreesWithP(Sampled, DrawnSets.AnyShape(12, 20));

    [Fact]
    public void Swapping_the_roles_turns_every_sign() =>
        DrawnSets.AnyShape(1, 5).Sample(sets => SetLaws.AreMirrored(sets.Run(SetRelabel.Run), sets.Swapped().Run(SetRelabel.Run), 1e-9));

    [Fact]
    public void Another_unit_and_another_origin_change_nothing_without_unit() =>
        DrawnSets.AnyShape(1, 5).Sample(sets =>
        {
            TestResult before = sets.Run(SetRelabel.Run), after = sets.With(value => (value * 8) + 64).Run(SetRelabel.Run);
            SetLaws.AreEqual(before with { Statistic = before.Statistic * 8 }, after, 8, 1e-7);
        });

    [Fact]
    public void A_set_without_variation_changes_no_exact_p_value() =>
        DrawnSets.AnyShape(1, 4).Sample(sets =>
            Assert.Equal(sets.Run(SetRelabel.Run).P.Value, sets.And([2, 2, 2], [true, false, false]).Run(SetRelabel.Run).P.Value, 1e-12));

    [Fact]
    public void Random_relabelings_come_near_the_exact_p_value_and_repeat_with_the_seed()
    {
        // 10 sets of 1:3 have 4^10 = 2^20 relabelings, all listed; an eleventh set without variation forces sampling.
        var random = new Random(5);
        var sets = new DrawnSets(
            [.. Enumerable.Range(0, 40).Select(i => Math.Round(random.NextDouble() + (i % 4 == 0 ? 0.2 : 0), 2))],
            [.. Enumerable.Range(0, 11).Select(s => 4 * s)],
            [.. Enumerable.Range(0, 40).Select(i => i % 4 == 0)],
            []);
        TestResult exact = sets.Run(SetRelabel.Run);
        DrawnSets more = sets.And([1, 1], [true, false]);
        TestResult sampled = more.Run(SetRelabel.Run, new TestOptions { Seed = 11, Resamples = 20000 });
        Assert.Equal((Remarks.Exact, Remarks.Resampled), (exact.Remarks, sampled.Remarks));
        double deviation = 2 * Math.Sqrt(exact.P.Value / 2 * (1 - (exact.P.Value / 2)) / 20000);
        Assert.Equal(exact.P.Value, sampled.P.Value, 4.5 * deviation);
        Assert.Equal(sampled, more.Run(SetRelabel.Run, new TestOptions { Seed = 11, Resamples = 20000 }));
        Assert.NotEqual(sampled.P, more.Run(SetRelabel.Run, new TestOptions { Seed = 12, Resamples = 20000 }).P);
    }

    [Fact]
    public void A_random_p_value_is_never_below_what_its_number_of_relabelings_can_give()
    {
        var sets = new DrawnSets(
            [.. Enumerable.Range(0, 60).Select(i => i % 2 == 0 ? i + 1.0 : i - 1)],
            [.. Enumerable.Range(0, 31).Select(s => 2 * s)],
            [.. Enumerable.Range(0, 60).Select(i => i % 2 == 0)],
            []);
        TestResult result = sets.Run(SetRelabel.Run, new TestOptions { Sides = Sides.Greater, Resamples = 99 });
        Assert.Equal(0.01, result.P.Value, 1e-15);
        Assert.Equal(0.01, result.SmallestPossibleP.Value, 1e-15);
    }

    [Fact]
    public void Every_relabeling_of_a_set_is_drawn_about_equally_often()
    {
        // One set of 2:4 whose values are powers of two, so that its 15 relabelings have 15 statistics.
        var sets = new DrawnSets([1, 2, 4, 8, 16, 32], [0, 6], [true, true, false, false, false, false], []);
        using Scratch.Frame frame = new Scratch().Open();
        var relabelings = new Relabelings(sets.Take(frame), mostListed: 0, resamples: 15000, frame);
        relabelings.Draw(3, frame);
        int[] counts = [.. relabelings.Falls.ToArray().GroupBy(fall => Math.Round(fall, 6)).Select(group => group.Count())];
        Assert.Equal(15, counts.Length);
        Assert.All(counts, count => Assert.InRange(count, 1000 - 140, 1000 + 140)); // 4.6 standard deviations of 30.6
    }

    private static TestResult Sampled(in SetSample sets, TestOptions options, Scratch scratch) =>
        SetRelabel.Run(sets, options with { Resamples = 199, Seed = 4 }, scratch);

    private static double UpperTail(DrawnSets sets, double shift)
    {
        double[] all = Statistics(sets, shift);
        double observed = Observed(sets, shift);
        return all.Count(t => t >= observed - 1e-9) / (double)all.Length;
    }

    private static double Observed(DrawnSets sets, double shift) =>
        Enumerable.Range(0, sets.Count).Sum(s => sets.Split(s).Index.Average() - shift - sets.Split(s).Reference.Average());

    private static double[] Statistics(DrawnSets sets, double shift)
    {
        double[] sums = [0];
        for (int s = 0; s < sets.Count; s++)
        {
            var (index, reference) = sets.Split(s);
            double[] values = [.. index.Select(value => value - shift), .. reference];
            double[] own = [.. Enumerable.Range(0, 1 << values.Length).Where(subset => int.PopCount(subset) == index.Length)
                .Select(subset => values.Where((_, i) => (subset >> i & 1) == 1).Average() - values.Where((_, i) => (subset >> i & 1) == 0).Average())];
            sums = [.. sums.SelectMany(sum => own.Select(more => sum + more))];
        }

        return sums;
    }
}
