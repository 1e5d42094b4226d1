using CsCheck;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class SignedRanksTests
{
    [Fact]
    public void Decimals_that_are_equal_tie_though_their_binary_differences_are_not()
    {
        // 0.67 three times and -0.67; binary subtraction gives three different last digits.
        var ranks = Ranked([1.94, 2.02, 1.1, 0.35], [1.27, 1.35, 0.43, 1.02]);
        Assert.NotEqual(1.94 - 1.27, 1.1 - 0.43);
        Assert.Equal([5, 5, 5, 5], ranks.DoubledRanks);
        Assert.Equal(15, ranks.DoubledPositiveSum);
        Assert.Equal(60, ranks.TieTerm);
        Assert.Equal(-ranks.Sorted[0], ranks.Sorted[1]);
        Assert.Equal(ranks.Sorted[1], ranks.Sorted[2]);
        Assert.Equal(ranks.Sorted[1], ranks.Sorted[3]);
    }

    [Fact]
    public void Tenths_on_an_offset_of_1e12_keep_their_order()
    {
        var ranks = Ranked([1e12 + 0.3, 1e12 + 0.1, 1e12 + 0.4, 1e12], [1e12, 1e12, 1e12, 1e12 + 0.2]);
        Assert.Equal(0, ranks.TieTerm);
        Assert.Equal(0, ranks.Zeros);
        Assert.Equal(2 * (1 + 3 + 4), ranks.DoubledPositiveSum);
    }

    [Fact]
    public void Equal_tenths_on_an_offset_of_1e12_tie()
    {
        var ranks = Ranked([1e12 + 0.3, 1e12 + 0.6, 1e12 + 7.1], [1e12, 1e12 + 0.3, 1e12 + 7.4]);
        Assert.Equal([4, 4, 4], ranks.DoubledRanks);
    }

    [Fact]
    public void A_difference_that_only_binary_subtraction_left_is_a_zero()
    {
        double sum = 0.1 + 0.2;
        var ranks = Ranked([0.3, sum, 5.0, 2.0], [sum, 0.3, 5.0, 1.0]);
        Assert.NotEqual(0.3, sum);
        Assert.Equal(3, ranks.Zeros);
        Assert.Equal([0, 0, 0, 1.0], ranks.Sorted);
        Assert.Equal(2, ranks.DoubledPositiveSum);
    }

    [Fact]
    public void A_large_value_lends_its_rounding_only_to_its_own_ties()
    {
        // The pair at 1e12 is 0.3 to within 0.0005; the small pairs 0.3001 and 0.30005 differ from each other.
        var ranks = Ranked([0.3001, 0.30005, 1e12 + 0.9], [0, 0, 1e12]);
        Assert.Equal(0, ranks.TieTerm);
        var tied = Ranked([0.3001, 1e12 + 0.3], [0, 1e12]);
        Assert.Equal([3, 3], tied.DoubledRanks);
    }

    [Fact]
    public void Ranks_are_those_of_counting_smaller_and_equal_sizes() =>
        Gen.Int[-6, 6].Array[1, 40].Sample(values =>
        {
            var ranks = Ranked([.. values.Select(v => v / 10.0 + 3.7)], [.. values.Select(_ => 3.7)]);
            int[] sizes = [.. values.Where(v => v != 0).Select(Math.Abs).Order()];
            int[] doubled = [.. sizes.Select(size => (2 * sizes.Count(other => other < size)) + sizes.Count(other => other == size) + 1)];
            long positive = values.Where(v => v > 0)
                .Sum(v => (2L * sizes.Count(other => other < v)) + sizes.Count(other => other == v) + 1);
            Assert.Equal(values.Count(v => v == 0), ranks.Zeros);
            Assert.Equal(positive, ranks.DoubledPositiveSum);
            Assert.Equal(sizes.GroupBy(s => s).Sum(g => Math.Pow(g.Count(), 3) - g.Count()), ranks.TieTerm);
            if (ranks.TieTerm > 0)
                Assert.Equal(doubled, ranks.DoubledRanks);
        });

    private static (double[] Sorted, int Zeros, int[] DoubledRanks, long DoubledPositiveSum, double TieTerm) Ranked(double[] index, double[] reference)
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var ranks = SignedRanks.Of(PairSample.Of(index, reference, frame), frame);
        return (ranks.Sorted.ToArray(), ranks.Zeros, ranks.DoubledRanks.ToArray(), ranks.DoubledPositiveSum, ranks.TieTerm);
    }
}
