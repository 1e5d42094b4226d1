using CsCheck;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class McNemarTests
{
    private static readonly Gen<PairedTable> Discordant =
        Gen.Select(Gen.Int[0, 12], Gen.Int[0, 12]).Where((b, c) => b + c > 0).Select((b, c) => new PairedTable(3, b, c, 4));

    [Fact]
    public void Exact_p_equals_the_enumeration_of_all_directions() =>
        Gen.Select(Discordant, Gen.Enum<Sides>()).Sample((table, sides) =>
        {
            double atLeast = Enumerable.Range(table.IndexOnly, table.ReferenceOnly + 1).Sum(x => Share(table.Discordant, x));
            double atMost = Enumerable.Range(0, table.IndexOnly + 1).Sum(x => Share(table.Discordant, x));
            double expected = sides switch
            {
                Sides.Greater => atLeast,
                Sides.Less => atMost,
                _ => Math.Min(1, 2 * Math.Min(atLeast, atMost)),
            };
            var options = new TestOptions { Sides = sides };
            Assert.Equal(expected, McNemarExact.Run(table, options).P.Value, tolerance: 1e-13);

            double observed = Share(table.Discordant, table.IndexOnly);
            double mid = sides == Sides.Two
                ? (table.IndexOnly == table.ReferenceOnly ? 1 - (observed / 2) : expected - observed)
                : expected - (observed / 2);
            Assert.Equal(mid, McNemarMidP.Run(table, options).P.Value, tolerance: 1e-13);
        });

    [Fact]
    public void The_signed_roots_give_one_sided_p_values_whose_double_is_the_chi_squared_tail() =>
        Discordant.Sample(table =>
        {
            foreach (var run in new Func<PairedTable, TestOptions, TestResult>[] { (t, o) => McNemar.Run(t, o), (t, o) => McNemarCorrected.Run(t, o) })
            {
                var two = run(table, TestOptions.Default);
                var side = table.IndexOnly >= table.ReferenceOnly ? Sides.Greater : Sides.Less;
                var one = run(table, new TestOptions { Sides = side });
                Assert.Equal(ChiSquared.UpperTail(two.Statistic, 1).Value, two.P.Value, tolerance: 1e-13);
                Assert.Equal(two.P.Value, Math.Min(1, 2 * one.P.Value), tolerance: 1e-15);
                Assert.Equal(1, two.DegreesOfFreedom);
            }
        });

    [Fact]
    public void Very_one_sided_tables_keep_their_logarithm()
    {
        var table = new PairedTable(0, 3000, 0, 0);
        Assert.Equal(-2999 * Math.Log10(2), McNemarExact.Run(table, TestOptions.Default).P.Log10, tolerance: 1e-9);
        Assert.Equal(-3000 * Math.Log10(2), McNemarMidP.Run(table, TestOptions.Default).P.Log10, tolerance: 1e-9);
        Assert.Equal(McNemarMidP.Run(table, TestOptions.Default).SmallestPossibleP.Log10,
            McNemarMidP.Run(table, TestOptions.Default).P.Log10, tolerance: 1e-9);
        Assert.InRange(McNemar.Run(table, TestOptions.Default).P.Log10, -660, -650);
    }

    [Fact]
    public void A_zero_cell_leaves_one_end_of_the_log_odds_open()
    {
        var result = McNemarExact.Run(new PairedTable(1, 5, 0, 2), TestOptions.Default);
        Assert.Equal(double.PositiveInfinity, result.Estimate);
        Assert.Equal(double.PositiveInfinity, result.Interval.High);
        Assert.True(double.IsFinite(result.Interval.Low));
        Assert.True(double.IsNaN(result.StandardError));
        Assert.Equal(Remarks.OneSidedDiscordance | Remarks.Exact, result.Remarks);
    }

    [Fact]
    public void The_table_counts_both_roles()
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var table = PairedTable.Of(PairSample.Of([1, 1, 1, 1, 1, 1, 0, 0, 0, 0], [1, 1, 1, 1, 0, 0, 1, 0, 0, 0], frame));
        Assert.Equal(new PairedTable(4, 2, 1, 3), table);
        Assert.Equal(10, table.Pairs);
    }

    [Fact]
    public void A_value_that_is_no_yes_or_no_is_the_callers_mistake()
    {
        var error = Assert.Throws<ArgumentException>(() => PairMethods.Binary["mcnemar"]([1, 2], [0, 0], TestOptions.Default));
        Assert.Contains("value 2", error.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Without_a_discordant_pair_nothing_is_tested()
    {
        foreach (var method in PairMethods.Binary.Values)
        {
            Assert.Equal(Outcome.NothingDiffers, method([1, 0], [1, 0], TestOptions.Default).Outcome);
            Assert.Equal(Outcome.TooFewSets, method([], [], TestOptions.Default).Outcome);
        }
    }

    private static double Share(int n, int x)
    {
        double share = Math.Pow(0.5, n);
        for (int i = 1; i <= x; i++)
            share *= (double)(n - i + 1) / i;
        return share;
    }
}
