using CsCheck;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Statistics.Tests.Visits;

public class RepeatedMeasuresAnovaTests
{
    [Fact]
    public void Two_visits_give_the_square_of_the_paired_t() =>
        VisitTable.Complete(3, 15, 2, 2).Sample(table =>
        {
            var scratch = new Scratch();
            using var frame = scratch.Open();
            var t = PairedT.Run(PairSample.Of(table.Visit(1), table.Visit(0), frame), TestOptions.Default, scratch);
            foreach (var result in AllThree(table))
            {
                Close.To(t.Statistic * t.Statistic, result.Statistic, 1e-11, 1e-13);
                Close.To(t.DegreesOfFreedom, result.DenominatorDegreesOfFreedom, 1e-12);
                Close.To(t.P.Value, result.P.Value, 1e-9);
            }
        }, iter: 300);

    [Fact]
    public void Epsilon_lies_between_its_bound_and_one_and_orders_the_three_p_values() =>
        VisitTable.Complete(3, 12, 3, 5).Sample(table =>
        {
            var fit = RepeatedMeasuresAnova.Fit(table.Sample(), new Scratch());
            Assert.InRange(fit.GreenhouseGeisser, 1.0 / (table.Visits - 1) - 1e-12, 1);
            Assert.True(fit.HuynhFeldt >= fit.GreenhouseGeisser - 1e-12);
            Assert.True(fit.Sphericity.P.IsMissing || fit.Sphericity.P.Value is >= 0 and <= 1);
            Assert.True(double.IsNaN(fit.Sphericity.W) || fit.Sphericity.W is >= 0 and <= 1);
            if (fit.F > 1.5)
                Assert.True(fit.P(SphericityCorrection.GreenhouseGeisser).Value >= fit.P(SphericityCorrection.None).Value);
        }, iter: 300);

    [Fact]
    public void Sums_of_squares_add_up_to_the_total() =>
        VisitTable.Complete(3, 12, 2, 5).Sample(table =>
        {
            var fit = RepeatedMeasuresAnova.Fit(table.Sample(), new Scratch());
            double mean = table.Values.Average();
            Close.To(table.Values.Sum(value => (value - mean) * (value - mean)), fit.VisitSquares + fit.SubjectSquares + fit.ErrorSquares, 1e-11);
        }, iter: 300);

    [Fact]
    public void The_order_of_subjects_and_visits_and_the_unit_change_nothing() =>
        VisitTable.Complete(3, 10, 2, 5).Sample(table =>
        {
            var here = AllThree(table);
            foreach (var other in new[] { table.SubjectsReversed(), table.VisitsReversed(), table.Map(value => 1e6 + 16 * value) })
            {
                var there = AllThree(other);
                for (int i = 0; i < here.Length; i++)
                {
                    Close.To(here[i].Statistic, there[i].Statistic, 1e-7, 1e-12);
                    Close.To(here[i].P.Value, there[i].P.Value, 1e-6);
                }
            }
        }, iter: 200);

    [Fact]
    public void Subjects_with_a_missing_visit_are_left_out()
    {
        double[] values = [1, 2, 4, 2, 2.5, 4.5, double.NaN, 9, 9, 1.5, 3, 3.5];
        var withGap = RepeatedMeasuresAnova.Uncorrected(VisitSample.Of(values, [0, 1, 2]), TestOptions.Default, new Scratch());
        var without = RepeatedMeasuresAnova.Uncorrected(VisitSample.Of([.. values[..6], .. values[9..]], [0, 1, 2]), TestOptions.Default, new Scratch());
        Assert.Equal(3, withGap.Sets);
        Assert.Equal(without, withGap);
    }

    [Fact]
    public void What_cannot_be_tested_is_said_so()
    {
        var scratch = new Scratch();
        Assert.Equal(Outcome.TooFewSets, RepeatedMeasuresAnova.Uncorrected(VisitSample.Of([1, 2, 3], [0, 1, 2]), TestOptions.Default, scratch).Outcome);
        // Decimals of one shift each: 0.1 + 0.2 leaves rounding, not variation.
        double[] shifted = [0.1, 0.3, 0.7, 0.2, 0.4, 0.8, 0.3, 0.5, 0.9];
        Assert.Equal(Outcome.NoVariation, RepeatedMeasuresAnova.Uncorrected(VisitSample.Of(shifted, [0, 1, 2]), TestOptions.Default, scratch).Outcome);
    }

    private static TestResult[] AllThree(VisitTable table)
    {
        var scratch = new Scratch();
        return
        [
            RepeatedMeasuresAnova.Uncorrected(table.Sample(), TestOptions.Default, scratch),
            RepeatedMeasuresAnova.GreenhouseGeisser(table.Sample(), TestOptions.Default, scratch),
            RepeatedMeasuresAnova.HuynhFeldt(table.Sample(), TestOptions.Default, scratch),
        ];
    }
}
