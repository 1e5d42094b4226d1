using CsCheck;
using MatchedSuite.Statistics.Crossover;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Tests.Visits;
using MatchedSuite.Tests;

namespace MatchedSuite.Statistics.Tests.Crossover;

public class CrossoverMethodsTests
{
    private static readonly Method[] All = [CrossoverT.Run, CrossoverT.Period, CrossoverT.CarryOver];

    private static readonly Gen<Trial> Trials =
        from n in Gen.Int[6, 16]
        from first in Gen.Int[5000, 9000].Array[n]
        from second in Gen.Int[5000, 9000].Array[n]
        select new Trial([.. first.Select(x => x / 1024.0)], [.. second.Select(x => x / 1024.0)], Alternate(n));

    private static readonly Gen<Trial> Signs =
        from n in Gen.Int[6, 24]
        from first in Gen.Int[0, 1].Array[n]
        from second in Gen.Int[0, 1].Array[n]
        select new Trial([.. first.Select(x => (double)x)], [.. second.Select(x => (double)x)], Alternate(n));

    private delegate TestResult Method(in CrossoverSample sample, TestOptions options, Scratch scratch);

    [Fact]
    public void Exchanging_the_treatments_negates_their_effect_and_their_carry_over_but_not_the_period() =>
        Trials.Sample(trial =>
        {
            foreach (var (method, sign) in All.Zip(new[] { -1, 1, -1 }))
            {
                var here = trial.Run(method, Sides.Two);
                var there = trial.TreatmentsExchanged().Run(method, Sides.Two);
                Close.To(here.Estimate, sign * there.Estimate, 1e-11, 1e-13);
                Close.To(here.P.Value, there.P.Value, 1e-10);
            }
        }, iter: 200);

    [Fact]
    public void A_level_a_period_effect_and_a_treatment_effect_go_where_they_belong() =>
        Gen.Select(Trials, Gen.Int[-3000, 3000], Gen.Int[-3000, 3000]).Sample((trial, periods, treatments) =>
        {
            double period = periods / 1024.0, treatment = treatments / 1024.0;
            var changed = trial.With(period, treatment);
            Close.To(trial.Run(CrossoverT.Run, Sides.Two).Estimate + treatment, changed.Run(CrossoverT.Run, Sides.Two).Estimate, 1e-11, 1e-12);
            Close.To(trial.Run(CrossoverT.Period, Sides.Two).Estimate + period, changed.Run(CrossoverT.Period, Sides.Two).Estimate, 1e-11, 1e-12);
            Close.To(trial.Run(CrossoverT.CarryOver, Sides.Two).Estimate, changed.Run(CrossoverT.CarryOver, Sides.Two).Estimate, 1e-11, 1e-12);
        }, iter: 200);

    [Fact]
    public void P_is_below_one_minus_confidence_exactly_when_the_interval_excludes_zero() =>
        Gen.Select(Trials, Signs, Gen.Enum<Sides>(), Gen.Double[0.5, 0.97]).Sample((trial, signs, sides, confidence) =>
        {
            TestResult[] results =
            [
                .. All.Select(method => trial.Run(method, sides, confidence)), signs.Run(MainlandGart.Run, sides, confidence),
            ];
            foreach (var result in results.Where(result => result.Outcome == Outcome.Tested))
            {
                Assert.InRange(result.P.Value, 0, 1);
                // At equality within rounding either side is right.
                IntervalLaw.Holds(result.P.Value, result.Interval, confidence);
            }
        }, iter: 300);

    [Fact]
    public void Mainland_Gart_mirrors_when_treatments_are_exchanged_and_holds_its_estimate() =>
        Signs.Sample(trial =>
        {
            var here = trial.Run(MainlandGart.Run, Sides.Greater);
            var there = trial.TreatmentsExchanged().Run(MainlandGart.Run, Sides.Less);
            Assert.Equal(here.Outcome, there.Outcome);
            if (here.Outcome != Outcome.Tested)
                return;
            Close.To(here.Estimate, -there.Estimate, 1e-9, 1e-10);
            Close.To(here.P.Value, there.P.Value, 1e-12);
            Close.To(here.Interval.Low, -there.Interval.High, 1e-9, 1e-10);
            Assert.True(trial.Run(MainlandGart.Run, Sides.Two).Interval.Contains(here.Estimate));
        }, iter: 300);

    [Fact]
    public void Tails_of_the_hypergeometric_are_those_of_its_counts_and_sum_to_one_plus_the_point() =>
        Gen.Select(Gen.Int[1, 9], Gen.Int[1, 9], Gen.Int[0, 9], Gen.Double[-3, 3]).Sample((row, column, more, logOdds) =>
        {
            int total = Math.Max(row, column) + more;
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var table = new FisherHypergeometric(row, column, total, frame);
            double[] weights = [.. Enumerable.Range(table.Smallest, table.Largest - table.Smallest + 1)
                .Select(x => Choose(row, x) * Choose(total - row, column - x) * Math.Exp(x * logOdds))];
            double all = weights.Sum(), mean = 0;
            for (int i = 0; i < weights.Length; i++)
            {
                var (lower, upper) = table.Tails(table.Smallest + i, logOdds);
                Close.To(weights[..(i + 1)].Sum() / all, lower.Value, 1e-12);
                Close.To(weights[i..].Sum() / all, upper.Value, 1e-12);
                mean += (table.Smallest + i) * weights[i] / all;
            }

            Close.To(mean, table.Mean(logOdds), 1e-12);
        }, iter: 200);

    [Fact]
    public void What_cannot_be_tested_is_said_so()
    {
        var agreeing = new Trial([1, 0, 1, 0], [1, 0, 1, 0], Alternate(4));
        Assert.Equal(Outcome.NothingDiffers, agreeing.Run(MainlandGart.Run, Sides.Two).Outcome);
        var oneSequence = new Trial([1, 2, 3], [2, 1, 4], [TreatmentSequence.IndexFirst, TreatmentSequence.IndexFirst, TreatmentSequence.ReferenceFirst]);
        Assert.All(All, method => Assert.Equal(Outcome.TooFewSets, oneSequence.Run(method, Sides.Two).Outcome));
        var flat = new Trial([0.3, 0.5, 0.7, 0.9], [0.2, 0.4, 0.6, 0.8], Alternate(4));
        Assert.Equal(Outcome.NoVariation, flat.Run(CrossoverT.Run, Sides.Two).Outcome);
        Assert.Throws<ArgumentException>(() => new Trial([1, 2], [0, 1], Alternate(2)).Run(MainlandGart.Run, Sides.Two));
    }

    [Fact]
    public void An_endpoint_allocates_nothing()
    {
        double[] first = [1, 0, 1, 1, 0, 1, 0, 1, 1, 0], second = [0, 1, 1, 0, 0, 0, 1, 1, 0, 1];
        var sequences = Alternate(10);
        var scratch = new Scratch();
        Assert.Equal(0, Allocated.Least(() => Analyse(first, second, sequences, scratch)));
    }

    private static void Analyse(double[] first, double[] second, TreatmentSequence[] sequences, Scratch scratch)
    {
        using var frame = scratch.Open();
        var sample = CrossoverSample.Of(first, second, sequences, frame);
        CrossoverT.Run(sample, TestOptions.Default, scratch);
        CrossoverT.Period(sample, TestOptions.Default, scratch);
        CrossoverT.CarryOver(sample, TestOptions.Default, scratch);
        MainlandGart.Run(sample, TestOptions.Default, scratch);
    }

    private static double Choose(int n, int k) => k < 0 || k > n ? 0 : Enumerable.Range(1, k).Aggregate(1.0, (product, i) => product * (n - k + i) / i);

    private static TreatmentSequence[] Alternate(int n) =>
        [.. Enumerable.Range(0, n).Select(i => i % 2 == 0 ? TreatmentSequence.IndexFirst : TreatmentSequence.ReferenceFirst)];

    private sealed record Trial(double[] First, double[] Second, TreatmentSequence[] Sequences)
    {
        public Trial TreatmentsExchanged() => this with { Sequences = [.. Sequences.Select(sequence => 1 - sequence)] };

        public Trial With(double period, double treatment) => this with
        {
            First = [.. First.Select((value, i) => value + (Sequences[i] == TreatmentSequence.IndexFirst ? treatment : 0))],
            Second = [.. Second.Select((value, i) => value + period + (Sequences[i] == TreatmentSequence.ReferenceFirst ? treatment : 0))],
        };

        public TestResult Run(Method method, Sides sides, double confidence = 0.95)
        {
            var scratch = new Scratch();
            using var frame = scratch.Open();
            return method(CrossoverSample.Of(First, Second, Sequences, frame), new TestOptions { Sides = sides, Confidence = confidence }, scratch);
        }
    }
}
