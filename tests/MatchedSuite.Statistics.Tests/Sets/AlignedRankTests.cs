using CsCheck;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Statistics.Tests.Sets;

public class AlignedRankTests
{
    [Fact]
    public void Mean_and_variance_are_those_of_every_relabeling_within_sets() =>
        DrawnSets.AnyShape(1, 3).Sample(sets =>
        {
            TestResult result = sets.Run(AlignedRank.Run);
            if (result.Outcome != Outcome.Tested)
                return;
            double[] ranks = Ranks(sets);
            double[] sums = [0];
            double observed = 0;
            for (int s = 0; s < sets.Count; s++)
            {
                int first = sets.Starts[s], n = sets.Starts[s + 1] - first, index = sets.Split(s).Index.Length;
                observed += Enumerable.Range(first, n).Where(m => sets.IsIndex[m]).Sum(m => ranks[m]);
                double[] own = [.. Enumerable.Range(0, 1 << n).Where(subset => int.PopCount(subset) == index)
                    .Select(subset => Enumerable.Range(0, n).Where(i => (subset >> i & 1) == 1).Sum(i => ranks[first + i]))];
                sums = [.. sums.SelectMany(sum => own.Select(more => sum + more))];
            }

            double mean = sums.Average();
            Assert.Equal((observed - mean) / Math.Sqrt(sums.Average(sum => (sum - mean) * (sum - mean))), result.Statistic, 1e-9);
        });

    [Fact]
    public void The_interval_excludes_zero_exactly_when_p_is_below_one_minus_confidence() =>
        SetLaws.IntervalAgreesWithP(AlignedRank.Run, DrawnSets.AnyShape(2, 15));

    [Fact]
    public void Swapping_the_roles_turns_every_sign() =>
        DrawnSets.AnyShape(2, 12).Sample(sets => SetLaws.AreMirrored(sets.Run(AlignedRank.Run), sets.Swapped().Run(AlignedRank.Run), 1e-7));

    [Fact]
    public void Another_unit_changes_nothing_without_unit() =>
        DrawnSets.AnyShape(2, 12).Sample(sets =>
            SetLaws.AreEqual(sets.Run(AlignedRank.Run), sets.With(value => value * 8).Run(AlignedRank.Run), 8, 1e-9));

    [Fact]
    public void The_order_of_sets_and_members_plays_no_part() =>
        DrawnSets.AnyShape(2, 12).Sample(sets => SetLaws.AreEqual(sets.Run(AlignedRank.Run), sets.Turned().Run(AlignedRank.Run), 1, 1e-7));

    [Fact]
    public void A_shift_put_on_the_index_role_comes_back_in_estimate_and_interval() =>
        DrawnSets.OneToThree(3, 15).Sample(sets =>
        {
            double[] shifted = [.. sets.Values.Select((value, m) => value + (sets.IsIndex[m] ? 1.7 : 0))];
            TestResult before = sets.Run(AlignedRank.Run), after = (sets with { Values = shifted }).Run(AlignedRank.Run);
            if (before.Outcome != Outcome.Tested || after.Outcome != Outcome.Tested)
                return;
            Assert.Equal(before.Estimate + 1.7, after.Estimate, 1e-9);
            Assert.Equal(before.Interval.Low + 1.7, after.Interval.Low, 1e-9);
            Assert.Equal(before.Interval.High + 1.7, after.Interval.High, 1e-9);
        });

    [Fact]
    public void Centred_values_tie_as_decimals_do()
    {
        // Centred on their means both sets read −0.335, 0.335; in binary they differ in the last places.
        var sets = new DrawnSets([1.94, 1.27, 2.02, 1.35], [0, 2, 4], [true, false, true, false], []);
        TestResult result = sets.Run(AlignedRank.Run);
        Assert.Equal(Remarks.Ties, result.Remarks & Remarks.Ties);
        Assert.Equal(Math.Sqrt(2), result.Statistic, 1e-12); // midranks 3.5, 1.5: (7 − 5) / √2
    }

    [Fact]
    public void Values_that_do_not_differ_within_sets_are_not_tested() =>
        Assert.Equal(Outcome.NothingDiffers, new DrawnSets([3, 3, 5, 5], [0, 2, 4], [true, false, true, false], []).Run(AlignedRank.Run).Outcome);

    private static double[] Ranks(DrawnSets sets)
    {
        double[] centred = new double[sets.Values.Length];
        for (int s = 0; s < sets.Count; s++)
        {
            double mean = sets.Values[sets.Starts[s]..sets.Starts[s + 1]].Average();
            for (int m = sets.Starts[s]; m < sets.Starts[s + 1]; m++)
                centred[m] = Math.Round(sets.Values[m] - mean, 9);
        }

        return Array.ConvertAll(centred, value => centred.Count(other => other < value) + ((centred.Count(other => other == value) + 1) / 2.0));
    }
}
