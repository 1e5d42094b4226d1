using CsCheck;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Statistics.Tests.Visits;

/// <summary>Friedman's and Page's tests share their null: all rearrangements of the midranks within subjects.</summary>
public class RankTestsOfVisitsTests
{
    private static readonly Gen<VisitTable> Small = Gen.OneOf(VisitTable.Coarse(2, 4, 2, 3), VisitTable.Coarse(2, 3, 4, 4), VisitTable.Complete(2, 4, 2, 3));

    [Fact]
    public void Exact_p_values_are_those_of_listing_every_rearrangement() =>
        Small.Sample(table =>
        {
            var friedman = Friedman.Fit(table.Sample(), new Scratch());
            var page = PageTrend.Fit(table.Sample(), new Scratch());
            double[][] ranks = [.. table.Values.Chunk(table.Visits).Select(Midranks)];
            if (friedman.Outcome != Outcome.Tested)
            {
                Assert.All(ranks, row => Assert.Single(row.Distinct()));
                Assert.Equal(Outcome.NothingDiffers, page.Outcome);
                return;
            }

            double observed = Departure(ranks), ordered = Ordered(ranks);
            long all = 0, departures = 0, above = 0, below = 0;
            foreach (var arrangement in Arrangements(ranks, 0))
            {
                all++;
                departures += Departure(arrangement) >= observed - 1e-9 ? 1 : 0;
                above += Ordered(arrangement) >= ordered - 1e-9 ? 1 : 0;
                below += Ordered(arrangement) <= ordered + 1e-9 ? 1 : 0;
            }

            Close.To((double)departures / all, friedman.ExactP.Value, 1e-12);
            Close.To((double)above / all, page.ExactUpper.Value, 1e-12);
            Close.To((double)below / all, page.ExactLower.Value, 1e-12);
            Assert.Equal(ordered, page.L);
        }, iter: 150);

    [Fact]
    public void Monotone_changes_and_the_order_of_subjects_change_nothing() =>
        Gen.OneOf(VisitTable.Complete(2, 30, 2, 6), VisitTable.Coarse(3, 30, 3, 5)).Sample(table =>
        {
            foreach (var other in new[] { table.Map(Math.Exp), table.Map(value => 1000 + 8 * value), table.SubjectsReversed() })
            {
                foreach (var (here, there) in Both(table).Zip(Both(other)))
                {
                    Assert.Equal(here.Outcome, there.Outcome);
                    Close.To(here.Statistic, there.Statistic, 1e-13);
                    Close.To(here.P.Value, there.P.Value, 1e-10);
                }
            }
        }, iter: 150);

    [Fact]
    public void Visits_backwards_mirror_Page_and_leave_Friedman_alone() =>
        Gen.OneOf(VisitTable.Complete(2, 30, 2, 6), VisitTable.Coarse(3, 30, 3, 5)).Sample(table =>
        {
            var greater = new TestOptions { Sides = Sides.Greater };
            var less = new TestOptions { Sides = Sides.Less };
            var scratch = new Scratch();
            var back = table.VisitsReversed();
            var rising = PageTrend.Run(table.Sample(), greater, scratch);
            var falling = PageTrend.Run(back.Sample(), less, scratch);
            Assert.Equal(rising.Outcome, falling.Outcome);
            Close.To(rising.P.Value, falling.P.Value, 1e-11);
            Close.To(rising.EffectSize, -falling.EffectSize, 1e-12, 1e-14);
            Close.To(
                Friedman.Run(table.Sample(), greater, scratch).P.Value,
                Friedman.Run(back.Sample(), greater, scratch).P.Value, 1e-11);
        }, iter: 200);

    [Fact]
    public void Two_visits_give_Friedman_the_exact_sign_test() =>
        VisitTable.Coarse(3, 30, 2, 2).Sample(table =>
        {
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var friedman = Friedman.Run(table.Sample(), TestOptions.Default, scratch);
            var sign = SignTest.Run(PairSample.Of(table.Visit(1), table.Visit(0), frame), TestOptions.Default, scratch);
            Close.To(sign.P.Value, friedman.P.Value, 1e-12);
        }, iter: 200);

    [Fact]
    public void Values_that_differ_only_by_binary_rounding_tie()
    {
        // 0.1 + 0.2 and 0.3 are one decimal.
        double[] values = [0.1 + 0.2, 0.3, 0.5, 1.1, 1.2, 1.3];
        var result = Friedman.Run(VisitSample.Of(values, [0, 1, 2]), TestOptions.Default, new Scratch());
        Assert.True(result.Remarks.HasFlag(Remarks.Ties));
    }

    [Fact]
    public void Large_tables_are_not_enumerated_and_small_ones_are()
    {
        var scratch = new Scratch();
        double[] rising = [.. Enumerable.Range(0, 3 * 200).Select(at => (double)(at % 3))];
        Assert.False(Friedman.Run(VisitSample.Of(rising, [0, 1, 2]), TestOptions.Default, scratch).Remarks.HasFlag(Remarks.Exact));
        Assert.False(PageTrend.Run(VisitSample.Of(rising, [0, 1, 2]), TestOptions.Default, scratch).Remarks.HasFlag(Remarks.Exact));
        var small = Friedman.Run(VisitSample.Of(rising.AsSpan(0, 45), [0, 1, 2]), TestOptions.Default, scratch);
        Assert.True(small.Remarks.HasFlag(Remarks.Exact));
        // All 15 subjects agree: 6 of 6^15 rearrangements do.
        Close.To(-14 * Math.Log10(6), small.P.Log10, 1e-12);
        Close.To(1, small.EffectSize, 1e-14);
    }

    private static TestResult[] Both(VisitTable table) =>
    [
        Friedman.Run(table.Sample(), TestOptions.Default, new Scratch()),
        PageTrend.Run(table.Sample(), TestOptions.Default, new Scratch()),
    ];

    private static double[] Midranks(double[] row) =>
        [.. row.Select(value => row.Count(other => other < value) + (row.Count(other => other == value) + 1) / 2.0)];

    private static double Departure(double[][] ranks) =>
        Enumerable.Range(0, ranks[0].Length).Sum(j => Math.Pow(ranks.Sum(row => row[j]) - ranks.Length * (ranks[0].Length + 1) / 2.0, 2));

    private static double Ordered(double[][] ranks) => ranks.Sum(row => row.Select((rank, j) => (j + 1) * rank).Sum());

    private static IEnumerable<double[][]> Arrangements(double[][] ranks, int subject)
    {
        if (subject == ranks.Length)
        {
            yield return ranks;
            yield break;
        }

        foreach (double[] order in Orders(ranks[subject]))
        {
            double[][] changed = [.. ranks];
            changed[subject] = order;
            foreach (var arrangement in Arrangements(changed, subject + 1))
                yield return arrangement;
        }
    }

    private static IEnumerable<double[]> Orders(double[] items) => items.Length < 2
        ? [items]
        : Enumerable.Range(0, items.Length).SelectMany(first =>
            Orders([.. items[..first], .. items[(first + 1)..]]).Select(rest => (double[])[items[first], .. rest]));
}
