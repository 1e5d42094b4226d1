using CsCheck;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Statistics.Tests.Sets;

public class MantelHaenszelTests
{
    [Fact]
    public void The_variance_of_the_statistic_is_that_of_every_relabeling_within_sets() =>
        DrawnSets.AnyShape(1, 3).Sample(drawn =>
        {
            DrawnSets sets = drawn.Binary();
            TestResult result = sets.Run(MantelHaenszel.Run);
            double observed = 0, mean = 0, variance = 0;
            for (int s = 0; s < sets.Count; s++)
            {
                var (index, reference) = sets.Split(s);
                double[] values = [.. index, .. reference];
                double[] ones = [.. Enumerable.Range(0, 1 << values.Length).Where(subset => int.PopCount(subset) == index.Length)
                    .Select(subset => values.Where((_, i) => (subset >> i & 1) == 1).Sum())];
                observed += index.Sum();
                mean += ones.Average();
                variance += ones.Average(x => x * x) - (ones.Average() * ones.Average());
            }

            if (variance < 1e-9)
            {
                Assert.Equal(Outcome.NothingDiffers, result.Outcome);
                return;
            }

            Assert.Equal((observed - mean) * (observed - mean) / variance, result.Statistic, 1e-9);
        });

    [Fact]
    public void Swapping_the_roles_turns_estimate_and_interval() =>
        DrawnSets.AnyShape(3, 15).Sample(drawn =>
        {
            TestResult forward = drawn.Binary().Run(MantelHaenszel.Run), backward = drawn.Binary().Swapped().Run(MantelHaenszel.Run);
            SetLaws.AreMirrored(forward, backward with { Statistic = -backward.Statistic }, 1e-9);
        });

    [Fact]
    public void One_sided_tails_add_up_and_the_two_sided_one_is_that_of_chi_squared() =>
        DrawnSets.AnyShape(3, 15).Sample(drawn =>
        {
            DrawnSets sets = drawn.Binary();
            TestResult two = sets.Run(MantelHaenszel.Run);
            if (two.Outcome != Outcome.Tested)
                return;
            double greater = sets.Run(MantelHaenszel.Run, new TestOptions { Sides = Sides.Greater }).P.Value;
            double less = sets.Run(MantelHaenszel.Run, new TestOptions { Sides = Sides.Less }).P.Value;
            Assert.Equal(1, greater + less, 1e-12);
            if (two.Statistic > 1e-12)
                Assert.Equal(two.Estimate > 0, greater < less);
            Assert.Equal(ChiSquared.UpperTail(two.Statistic, 1).Value, two.P.Value, 1e-12);
        });

    [Fact]
    public void Where_no_set_speaks_against_it_the_odds_ratio_is_infinite_and_the_test_stands()
    {
        TestResult result = new DrawnSets([1, 0, 0, 1, 0], [0, 3, 5], [true, false, false, true, false], []).Run(MantelHaenszel.Run);
        Assert.Equal((double.PositiveInfinity, Remarks.OneSidedDiscordance), (result.Estimate, result.Remarks));
        Assert.Equal((2.0 / 3 + 1.0 / 2) * (2.0 / 3 + 1.0 / 2) / (2.0 / 9 + 1.0 / 4), result.Statistic, 1e-12);
    }

    [Fact]
    public void Values_other_than_zero_and_one_are_refused() =>
        Assert.Throws<ArgumentException>(() => new DrawnSets([2, 0], [0, 2], [true, false], []).Run(MantelHaenszel.Run));

    [Fact]
    public void Covariates_are_not_adjusted_for_and_the_result_says_so() =>
        Assert.Equal(
            Remarks.Unadjusted,
            new DrawnSets([1, 0, 0, 1], [0, 2, 4], [true, false, true, false], [1, 2, 3, 5]).Run(MantelHaenszel.Run).Remarks);
}
