using CsCheck;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class SignedRankPrattTests
{
    [Fact]
    public void Exact_p_equals_the_enumeration_of_all_sign_flips_with_the_zeros_ranked() =>
        Gen.Select(Gen.Int[-4, 4].Array[1, 11], Gen.Enum<Sides>()).Sample((tenths, sides) =>
        {
            var result = Run([.. tenths.Select(v => v / 10.0)], new TestOptions { Sides = sides });
            if (tenths.All(v => v == 0))
            {
                Assert.Equal(Outcome.NothingDiffers, result.Outcome);
                return;
            }

            // Twice the midrank among all sizes, zeros too.
            int DoubledRank(int value) =>
                tenths.Count(v => Math.Abs(v) < Math.Abs(value)) + tenths.Count(v => Math.Abs(v) <= Math.Abs(value)) + 1;
            int[] ranks = [.. tenths.Where(v => v != 0).Select(DoubledRank)];
            int observed = tenths.Where(v => v > 0).Sum(DoubledRank);
            int[] sums = [.. Enumerable.Range(0, 1 << ranks.Length).Select(signs => ranks.Where((_, i) => (signs >> i & 1) == 1).Sum())];
            double atLeast = sums.Count(sum => sum >= observed), atMost = sums.Count(sum => sum <= observed);
            double extreme = sides switch { Sides.Greater => atLeast, Sides.Less => atMost, _ => Math.Min(sums.Length, 2 * Math.Min(atLeast, atMost)) };
            Assert.Equal(extreme / sums.Length, result.P.Value, tolerance: 1e-14);
            Assert.Equal(observed / 2.0, result.Statistic);
            Assert.Equal((2.0 * observed / ranks.Sum()) - 1, result.EffectSize, tolerance: 1e-14);
        });

    [Fact]
    public void Without_zeros_it_is_the_signed_rank_test()
    {
        double[] differences = [.. Enumerable.Range(0, 40).Select(i => Math.Round(Math.Sin(2.3 * i), 1) + 0.25)];
        Assert.DoesNotContain(0, differences);
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var pairs = PairSample.Of(differences, new double[40], frame);
        Assert.Equal(SignedRank.Run(pairs, TestOptions.Default, scratch), SignedRankPratt.Run(pairs, TestOptions.Default, scratch));
    }

    [Theory]
    [InlineData(50, 3, true)]
    [InlineData(51, 3, false)]
    [InlineData(50, 451, false)]
    public void With_zeros_fifty_differences_among_five_hundred_pairs_are_enumerated(int ranked, int zeros, bool isExact)
    {
        double[] differences = [.. Enumerable.Range(1, ranked).Select(i => i % 3 == 0 ? -(double)i : i), .. new double[zeros]];
        var result = Run(differences, TestOptions.Default);
        Assert.Equal(isExact, result.Remarks.HasFlag(Remarks.Exact));
        Assert.True(result.Remarks.HasFlag(Remarks.Zeros));
    }

    [Fact]
    public void Around_the_border_the_approximation_agrees_with_the_exact_tail()
    {
        double[] At(int zeros) => [.. Enumerable.Range(1, 50).Select(i => i % 3 == 0 ? -(double)i : i), .. new double[zeros]];
        Assert.Equal(Run(At(450), TestOptions.Default).P.Log10, Run(At(451), TestOptions.Default).P.Log10, tolerance: 0.02);
    }

    private static TestResult Run(double[] differences, TestOptions options)
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return SignedRankPratt.Run(PairSample.Of(differences, new double[differences.Length], frame), options, scratch);
    }
}
