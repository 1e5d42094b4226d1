using CsCheck;
using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Statistics.Tests.Visits;

public class CochranQTests
{
    private static readonly Gen<VisitTable> Signs = VisitTable.Coarse(2, 20, 2, 5).Select(table => table.Map(value => value > 0.1 ? 1 : 0));

    [Fact]
    public void Two_visits_give_McNemars_statistic() =>
        Signs.Where(table => table.Visits == 2).Sample(table =>
        {
            double b = table.Visit(0).Zip(table.Visit(1)).Count(pair => pair is (1, 0));
            double c = table.Visit(0).Zip(table.Visit(1)).Count(pair => pair is (0, 1));
            var result = CochranQ.Run(table.Sample(), TestOptions.Default, new Scratch());
            if (b + c == 0)
                Assert.Equal(Outcome.NothingDiffers, result.Outcome);
            else
                Close.To((b - c) * (b - c) / (b + c), result.Statistic, 1e-13);
        }, iter: 300);

    [Fact]
    public void It_is_Friedmans_statistic_on_the_signs() =>
        Signs.Sample(table =>
        {
            var scratch = new Scratch();
            var q = CochranQ.Run(table.Sample(), TestOptions.Default, scratch);
            var friedman = Friedman.Fit(table.Sample(), scratch);
            Assert.Equal(q.Outcome, friedman.Outcome);
            Close.To(friedman.ChiSquared, q.Statistic, 1e-12);
        }, iter: 300);

    [Fact]
    public void Yes_and_no_may_change_places() =>
        Signs.Sample(table => Close.To(
            CochranQ.Run(table.Sample(), TestOptions.Default, new Scratch()).Statistic,
            CochranQ.Run(table.Map(value => 1 - value).Sample(), TestOptions.Default, new Scratch()).Statistic, 1e-13), iter: 200);

    [Fact]
    public void A_value_that_is_no_sign_is_refused() =>
        Assert.Throws<ArgumentException>(() => CochranQ.Run(VisitSample.Of([0, 1, 0.5, 1], [0, 1]), TestOptions.Default, new Scratch()));
}
