using CsCheck;
using MatchedSuite.Statistics.Arms;
using MatchedSuite.Statistics.Tests.Visits;
using MatchedSuite.Tests;

namespace MatchedSuite.Statistics.Tests.Arms;

/// <summary>Laws that hold for every comparison of changes between arms.</summary>
public class ArmMethodsTests
{
    private static readonly Method[] All = [ChangeWelch.Run, ChangeAncova.Run, ChangeRankSum.Run];

    private static readonly Gen<Trial> Continuous =
        from n in Gen.Int[6, 20]
        from baseline in Gen.Int[40_000, 60_000].Array[n]
        from change in Gen.Int[-3000, 5000].Array[n]
        from arms in Gen.Bool.Array[n]
        select Trial.Of([.. baseline.Select(value => value / 1024.0)], [.. change.Select(value => value / 1024.0)], arms);

    private static readonly Gen<Trial> Coarse =
        from n in Gen.Int[6, 40]
        from baseline in Gen.Int[400, 420].Array[n]
        from change in Gen.Int[-2, 3].Array[n]
        from arms in Gen.Bool.Array[n]
        select Trial.Of([.. baseline.Select(value => value / 10.0)], [.. change.Select(value => value / 10.0)], arms);

    private static readonly Gen<Trial> Trials = Gen.OneOf(Continuous, Coarse);

    private delegate TestResult Method(in ArmSample sample, TestOptions options, Scratch scratch);

    [Fact]
    public void Swapping_the_arms_negates_and_mirrors() =>
        Trials.Sample(trial =>
        {
            foreach (var method in All)
            {
                var here = trial.Run(method, Sides.Greater);
                var there = trial.Swapped().Run(method, Sides.Less);
                Assert.Equal(here.Outcome, there.Outcome);
                if (here.Outcome != Outcome.Tested)
                    continue;
                Close.To(here.Estimate, -there.Estimate, 1e-10, 1e-12);
                Close.To(here.P.Value, there.P.Value, 1e-9);
                Close.To(here.Interval.Low, -there.Interval.High, 1e-9, 1e-12);
                Close.To(here.EffectSize, -there.EffectSize, 1e-10, 1e-12);
            }
        }, iter: 300);

    [Fact]
    public void The_order_of_subjects_changes_nothing() =>
        Trials.Sample(trial =>
        {
            foreach (var method in All)
            {
                var here = trial.Run(method, Sides.Two);
                var there = trial.Reversed().Run(method, Sides.Two);
                Close.To(here.Estimate, there.Estimate, 1e-10, 1e-12);
                Close.To(here.P.Value, there.P.Value, 1e-9);
            }
        }, iter: 200);

    [Fact]
    public void Another_unit_multiplies_estimates_and_leaves_p_alone() =>
        Trials.Sample(trial =>
        {
            foreach (var method in All)
            {
                var here = trial.Run(method, Sides.Two);
                var there = trial.Scaled(16).Run(method, Sides.Two);
                Close.To(16 * here.Estimate, there.Estimate, 1e-11, 1e-12);
                Close.To(here.P.Value, there.P.Value, 1e-9);
                Close.To(here.EffectSize, there.EffectSize, 1e-10, 1e-12);
            }
        }, iter: 200);

    [Fact]
    public void P_is_below_one_minus_confidence_exactly_when_the_interval_excludes_zero() =>
        Gen.Select(Continuous, Gen.Enum<Sides>(), Gen.Double[0.5, 0.99]).Sample((trial, sides, confidence) =>
        {
            foreach (var method in All)
            {
                var result = trial.Run(method, sides, confidence);
                // With ties the rank sum's interval goes by the null without them.
                if (result.Outcome != Outcome.Tested || result.Remarks.HasFlag(Remarks.Ties))
                    continue;
                Assert.InRange(result.P.Value, 0, 1);
                IntervalLaw.Holds(result.P.Value, result.Interval, confidence);
            }
        }, iter: 500);

    [Fact]
    public void Two_sided_p_is_twice_the_smaller_one_sided() =>
        Trials.Sample(trial =>
        {
            foreach (var method in All)
            {
                var two = trial.Run(method, Sides.Two);
                if (two.Outcome != Outcome.Tested)
                    continue;
                double smaller = Math.Min(trial.Run(method, Sides.Greater).P.Value, trial.Run(method, Sides.Less).P.Value);
                Close.To(Math.Min(1, 2 * smaller), two.P.Value, 1e-12);
            }
        }, iter: 200);

    [Fact]
    public void Subjects_with_a_missing_value_are_left_out() =>
        Continuous.Sample(trial =>
        {
            foreach (var method in All)
                Assert.Equal(trial.Run(method, Sides.Two), trial.WithIncomplete().Run(method, Sides.Two));
        }, iter: 100);

    [Fact]
    public void The_analysis_of_covariance_finds_parallel_lines_and_a_flat_baseline_is_named()
    {
        double[] baseline = [1, 2, 3, 4, 11, 12, 13, 15], noise = [0.01, -0.01, -0.01, 0.01, 0.02, -0.04, 0.02, 0];
        double[] followUp = [.. baseline.Select((value, i) => 3 + 0.5 * value + (i < 4 ? 2 : 0) + noise[i])];
        Arm[] arms = [Arm.Index, Arm.Index, Arm.Index, Arm.Index, Arm.Reference, Arm.Reference, Arm.Reference, Arm.Reference];
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var fit = ChangeAncova.Fit(ArmSample.Of(baseline, followUp, arms, frame), scratch);
        Assert.Equal(2, fit.ArmEffect, 0.15);
        Assert.Equal(0.5, fit.BaselineSlope, 0.02);
        Assert.Equal(Outcome.Collinear, ChangeAncova.Fit(ArmSample.OfChanges(noise, arms, frame), scratch).Outcome);
    }

    [Fact]
    public void What_cannot_be_tested_is_said_so()
    {
        var flat = Trial.Of([1, 2, 3, 4, 5], [0.1, 0.1, 0.1, 0.1, 0.1], [true, false, true, false, true]);
        Assert.Equal(Outcome.NoVariation, flat.Run(ChangeWelch.Run, Sides.Two).Outcome);
        Assert.Equal(Outcome.NoVariation, flat.Run(ChangeAncova.Run, Sides.Two).Outcome);
        Assert.Equal(Outcome.NothingDiffers, flat.Run(ChangeRankSum.Run, Sides.Two).Outcome);
        var lonely = Trial.Of([1, 2, 3], [0.1, 0.4, 0.2], [true, true, true]);
        Assert.All(All, method => Assert.Equal(Outcome.TooFewSets, lonely.Run(method, Sides.Two).Outcome));
    }

    [Fact]
    public void An_endpoint_allocates_nothing()
    {
        var random = new Random(5);
        double[] before = [.. Enumerable.Range(0, 60).Select(_ => random.NextDouble())];
        double[] after = [.. before.Select(value => value + random.NextDouble())];
        Arm[] arms = [.. Enumerable.Range(0, 60).Select(i => i % 3 == 0 ? Arm.Index : Arm.Reference)];
        var scratch = new Scratch();
        Assert.Equal(0, Allocated.Least(() => Analyse(before, after, arms, scratch)));
    }

    private static void Analyse(double[] before, double[] after, Arm[] arms, Scratch scratch)
    {
        using var frame = scratch.Open();
        foreach (int size in new Sizes())
        {
            var sample = ArmSample.Of(before.AsSpan(0, size), after.AsSpan(0, size), arms.AsSpan(0, size), frame);
            ChangeWelch.Run(sample, TestOptions.Default, scratch);
            ChangeAncova.Run(sample, TestOptions.Default, scratch);
            ChangeRankSum.Run(sample, TestOptions.Default, scratch);
        }
    }

    // One size below and one above the largest exact one, without an array.
    private struct Sizes
    {
        private int _next;

        public readonly int Current => 30 * _next;

        public readonly Sizes GetEnumerator() => this;

        public bool MoveNext() => ++_next <= 2;
    }

    private sealed record Trial(double[] Baseline, double[] FollowUp, Arm[] Arms)
    {
        public static Trial Of(double[] baseline, double[] change, bool[] isIndex) =>
            new(baseline, [.. baseline.Zip(change, (value, by) => value + by)], [.. isIndex.Select(index => index ? Arm.Index : Arm.Reference)]);

        public Trial Swapped() => this with { Arms = [.. Arms.Select(arm => arm == Arm.Index ? Arm.Reference : Arm.Index)] };

        public Trial Reversed() => new([.. Baseline.Reverse()], [.. FollowUp.Reverse()], [.. Arms.Reverse()]);

        public Trial Scaled(double factor) => this with { Baseline = [.. Baseline.Select(x => x * factor)], FollowUp = [.. FollowUp.Select(x => x * factor)] };

        public Trial WithIncomplete() => new([double.NaN, .. Baseline, 5], [7, .. FollowUp, double.NaN], [Arm.Index, .. Arms, Arm.Reference]);

        public TestResult Run(Method method, Sides sides, double confidence = 0.95)
        {
            var scratch = new Scratch();
            using var frame = scratch.Open();
            return method(ArmSample.Of(Baseline, FollowUp, Arms, frame), new TestOptions { Sides = sides, Confidence = confidence }, scratch);
        }
    }
}
