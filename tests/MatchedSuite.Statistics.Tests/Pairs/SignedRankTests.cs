using CsCheck;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class SignedRankTests
{
    [Fact]
    public void Exact_p_equals_the_enumeration_of_all_sign_flips_ties_and_zeros_included() =>
        Gen.Select(Gen.Int[-5, 5].Array[1, 11], Gen.Enum<Sides>()).Sample((values, sides) =>
        {
            var result = Run([.. values.Select(v => v / 10.0)], new TestOptions { Sides = sides });
            int[] signed = [.. values.Where(v => v != 0)];
            if (signed.Length == 0)
            {
                Assert.Equal(Outcome.NothingDiffers, result.Outcome);
                return;
            }

            Assert.Equal(Enumerated(signed, sides), result.P.Value, tolerance: 1e-14);
            Assert.True(result.Remarks.HasFlag(Remarks.Exact));
            Assert.Equal(signed.Length < values.Length, result.Remarks.HasFlag(Remarks.Zeros));
            Assert.Equal(signed.Select(Math.Abs).Distinct().Count() < signed.Length, result.Remarks.HasFlag(Remarks.Ties));
        });

    [Fact]
    public void All_small_untied_samples_equal_the_enumeration()
    {
        for (int n = 1; n <= 9; n++)
        {
            for (int signs = 0; signs < 1 << n; signs++)
            {
                int[] values = [.. Enumerable.Range(1, n).Select(i => (signs >> (i - 1) & 1) == 1 ? i : -i)];
                foreach (var sides in Enum.GetValues<Sides>())
                {
                    double p = Run([.. values.Select(v => (double)v)], new TestOptions { Sides = sides }).P.Value;
                    Assert.Equal(Enumerated(values, sides), p, tolerance: 1e-14);
                }
            }
        }
    }

    [Theory]
    [InlineData(50, true)]
    [InlineData(51, false)]
    public void Ties_are_enumerated_up_to_fifty(int n, bool isExact)
    {
        var result = Run([.. Enumerable.Range(0, n).Select(i => 1.0 + (i % 7))], TestOptions.Default);
        Assert.Equal(isExact, result.Remarks.HasFlag(Remarks.Exact));
        Assert.Equal(!isExact, result.SmallestPossibleP.IsMissing);
    }

    [Theory]
    [InlineData(500, true)]
    [InlineData(501, false)]
    public void Untied_differences_are_enumerated_up_to_five_hundred(int n, bool isExact)
    {
        var result = Run([.. Enumerable.Range(1, n).Select(i => (double)i)], TestOptions.Default);
        Assert.Equal(isExact, result.Remarks.HasFlag(Remarks.Exact));
        if (isExact)
            Assert.Equal(-499 * Math.Log10(2), result.P.Log10, tolerance: 1e-10);
    }

    [Fact]
    public void Around_the_border_the_approximation_agrees_with_the_exact_tail()
    {
        var exact = SignedRankNull.Of(500).AtMost(56_000);
        var (approximate, _) = SignedRankNormal.Tails(56_000, 500, 0, 0);
        Assert.Equal(exact.Log10, approximate.Log10, tolerance: 0.001);
    }

    [Fact]
    public void Five_pairs_cannot_bound_the_centre_at_95_percent()
    {
        var result = Run([1.0, 2, 3, 4, 5], TestOptions.Default);
        Assert.Equal(0.0625, result.P.Value);
        Assert.Equal(result.P.Value, result.SmallestPossibleP.Value);
        Assert.Equal(new Interval(double.NegativeInfinity, double.PositiveInfinity), result.Interval);
        Assert.True(result.Remarks.HasFlag(Remarks.WideAsData));
        Assert.Equal(3, result.Estimate);
        Assert.Equal(1, result.EffectSize);
    }

    [Fact]
    public void Without_pairs_nothing_is_tested()
    {
        Assert.Equal(Outcome.TooFewSets, Run([], TestOptions.Default).Outcome);
        Assert.Equal(Outcome.NothingDiffers, Run([0.0, 0.0], TestOptions.Default).Outcome);
    }

    [Fact]
    public void A_confidence_outside_zero_and_one_is_the_callers_mistake() =>
        Assert.Throws<ArgumentOutOfRangeException>(() => Run([1.0, 2.0], new TestOptions { Confidence = 95 }));

    private static TestResult Run(double[] differences, TestOptions options) =>
        PairMethods.Measured["signed-rank"](differences, new double[differences.Length], options);

    private static double Enumerated(int[] values, Sides sides)
    {
        int[] doubledRanks = [.. values.Select(v =>
            (2 * values.Count(other => Math.Abs(other) < Math.Abs(v))) + values.Count(other => Math.Abs(other) == Math.Abs(v)) + 1)];
        int observed = values.Zip(doubledRanks).Sum(pair => pair.First > 0 ? pair.Second : 0);
        int atMost = 0, atLeast = 0;
        for (int signs = 0; signs < 1 << values.Length; signs++)
        {
            int sum = doubledRanks.Where((_, i) => (signs >> i & 1) == 1).Sum();
            atMost += sum <= observed ? 1 : 0;
            atLeast += sum >= observed ? 1 : 0;
        }

        double all = 1 << values.Length;
        return sides switch
        {
            Sides.Greater => atLeast / all,
            Sides.Less => atMost / all,
            _ => Math.Min(1, 2 * Math.Min(atMost, atLeast) / all),
        };
    }
}
