using CsCheck;
using MatchedSuite.Statistics.Arms;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Statistics.Tests.Visits;

namespace MatchedSuite.Statistics.Tests.Arms;

public class ChangeRankSumTests
{
    [Fact]
    public void The_exact_tails_are_those_of_listing_every_split_into_arms() =>
        Gen.Select(Gen.Int[1, 5], Gen.Int[1, 5]).Sample((first, second) =>
        {
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var counts = MannWhitneyNull.Counts(first, second, frame);
            double[] listed = new double[first * second + 1];
            for (int split = 0; split < 1 << (first + second); split++)
            {
                if (System.Numerics.BitOperations.PopCount((uint)split) == first)
                    listed[Inversions(split, first + second)]++;
            }

            Assert.Equal(listed, counts.ToArray());
        }, iter: 40);

    [Fact]
    public void The_largest_exact_table_has_as_many_arrangements_as_the_binomial_coefficient()
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        double sum = 0;
        foreach (double count in MannWhitneyNull.Counts(25, 25, frame))
            sum += count;
        Assert.Equal(126410606437752, sum);
    }

    [Fact]
    public void Estimate_and_limits_are_order_statistics_of_the_listed_differences() =>
        Gen.Select(Values, Values, Gen.Double[0.5, 0.99]).Sample((index, reference, confidence) =>
        {
            double[] listed = [.. index.SelectMany(x => reference.Select(y => x - y)).Order()];
            var scratch = new Scratch();
            using var frame = scratch.Open();
            Array.Sort(index);
            Array.Sort(reference);
            long quantile = MannWhitneyNull.NormalLowerQuantile(index.Length, reference.Length, (1 - confidence) / 2);
            var (estimate, low, high) = ShiftOfChanges.Of(index, reference, quantile, scratch);
            Close.To(0.5 * (listed[(listed.Length - 1) / 2] + listed[listed.Length / 2]), estimate, 1e-15, 1e-300);
            if (quantile == 0)
            {
                Assert.Equal((double.NegativeInfinity, double.PositiveInfinity), (low, high));
                return;
            }

            Assert.Equal(listed[quantile - 1], low);
            Assert.Equal(listed[^(int)quantile], high);
        }, iter: 400);

    [Fact]
    public void Every_rank_of_a_rectangle_of_sums_is_that_of_the_full_listing() =>
        Gen.Select(Values, Values).Sample((rows, columns) =>
        {
            Array.Sort(rows);
            Array.Sort(columns);
            double[] listed = [.. rows.SelectMany(x => columns.Select(y => x + y)).Order()];
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var selection = new PairwiseSumSelection(rows, columns, frame);
            for (int rank = 1; rank <= listed.Length; rank += 1 + listed.Length / 37)
                Assert.Equal(listed[rank - 1], selection.Select(rank, 0, 1e-3));
        }, iter: 200);

    [Fact]
    public void Changes_equal_as_decimals_tie_whatever_subtraction_leaves()
    {
        // 0.3 − 0.1 and 0.5 − 0.3 are both 0.2, but not in binary.
        double[] baseline = [0.1, 0.3, 1.0, 1.0, 1.0], followUp = [0.3, 0.5, 1.1, 1.8, 0.9];
        Arm[] arms = [Arm.Index, Arm.Reference, Arm.Index, Arm.Reference, Arm.Index];
        Assert.NotEqual(followUp[0] - baseline[0], followUp[1] - baseline[1]);
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var result = ChangeRankSum.Run(ArmSample.Of(baseline, followUp, arms, frame), TestOptions.Default, scratch);
        Assert.Equal(Remarks.Ties, result.Remarks & Remarks.Ties);
        Assert.Equal(0.5, result.Statistic);
    }

    [Fact]
    public void A_monotone_change_of_scale_leaves_the_p_value_alone() =>
        Gen.Select(Gen.Int[-2000, 2000].Select(i => i / 1000.0).Array[20, 70], Gen.Int[5, 12]).Sample((changes, first) =>
        {
            Arm[] arms = [.. changes.Select((_, i) => i < first ? Arm.Index : Arm.Reference)];
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var here = ChangeRankSum.Run(ArmSample.OfChanges(changes, arms, frame), TestOptions.Default, scratch);
            double[] bent = [.. changes.Select(Math.Exp)];
            var there = ChangeRankSum.Run(ArmSample.OfChanges(bent, arms, frame), TestOptions.Default, scratch);
            Assert.Equal(here.P, there.P);
        }, iter: 100);

    private static Gen<double[]> Values { get; } = Gen.OneOf(
        Gen.Double[-10, 10].Array[1, 30], Gen.Int[-4, 4].Select(i => i / 4.0).Array[1, 30], Gen.Double[-30, 30].Select(Math.Exp).Array[1, 30]);

    // Pairs in which a set bit stands above a clear one.
    private static int Inversions(int split, int bits)
    {
        int count = 0;
        for (int high = 0; high < bits; high++)
        {
            for (int low = 0; low < high; low++)
                count += (split >> high & 1) == 1 && (split >> low & 1) == 0 ? 1 : 0;
        }

        return count;
    }
}
