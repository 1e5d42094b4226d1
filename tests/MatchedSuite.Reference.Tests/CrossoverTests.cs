using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Crossover;

namespace MatchedSuite.Reference.Tests;

/// <summary>Invented crossovers; numbers from base R 4.2.2 as named at each test.</summary>
public class CrossoverTests
{
    private static readonly double[] First = [12.1, 9.4, 11.6, 10.2, 13.3, 8.9, 10.7, 9.9, 12.0, 8.1, 11.2];
    private static readonly double[] Second = [10.3, 9.1, 9.7, 10.4, 11.5, 8.0, 11.6, 10.8, 12.9, 9.9, 10.6];

    private delegate TestResult Method(in CrossoverSample sample, TestOptions options, Scratch scratch);

    /// <summary>t.test(var.equal = TRUE) on half differences, and lm(y ~ subject + period + treatment), which agree.</summary>
    [Fact]
    public void The_treatment_effect_is_that_of_the_linear_model_with_subjects_and_periods() =>
        Check(CrossoverT.Run, 0.9316666666666662, 0.26656190071647545, 3.49512313711185385, 0.006775300853234128, 0.3286617536317872, 1.5346715797015467);

    /// <summary>The same model's period effect.</summary>
    [Fact]
    public void The_period_effect_is_that_of_the_linear_model() =>
        Check(CrossoverT.Period, -0.15166666666666639, 0.26656190071647579, -0.56897353394843986, 0.58329194346300206, -0.75467157970154608, 0.45133824636821324);

    /// <summary>t.test(var.equal = TRUE) on the subjects' totals.</summary>
    [Fact]
    public void The_carry_over_is_the_difference_of_totals() =>
        Check(CrossoverT.CarryOver, -0.78999999999999915, 1.62113014991485582, -0.48731435908553739, 0.63768510407634493, -4.45725118045801771, 2.87725118045801986);

    /// <summary>
    /// The table 9, 3 / 4, 11. One-sided p of fisher.test; two-sided we double the smaller tail where fisher.test adds the
    /// unlikelier tables. Estimate and limits: roots (uniroot, tol = 1e-15) of the mean and the tails of dhyper times odds^x,
    /// with which those of fisher.test agree to the three or four digits that its own root finder gives.
    /// </summary>
    [Fact]
    public void Mainland_Gart_is_Fishers_exact_test_of_the_discordant_subjects()
    {
        const double Digits = 1e-9;
        var two = Binary(Sides.Two);
        var greater = Binary(Sides.Greater);
        var less = Binary(Sides.Less);
        Assert.Equal(9, two.Statistic);
        Assert.Equal(37, two.Sets);
        Assert.Equal(1, greater.P.Value / 0.016532059047875417, 1e-12);
        Assert.Equal(1, less.P.Value / 0.99843929944212617, 1e-12);
        Assert.Equal(1, two.P.Value / (2 * 0.016532059047875417), 1e-12);
        Assert.Equal(1.00847140320197126, two.Estimate, Digits);
        Assert.Equal(0.06430261095798029, two.Interval.Low, Digits);
        Assert.Equal(2.10999120621456493, two.Interval.High, Digits);
        Assert.Equal(0.18296020395604035, greater.Interval.Low, Digits);
        Assert.Equal(double.PositiveInfinity, greater.Interval.High);
        Assert.Equal(1.94786995076911329, less.Interval.High, Digits);
    }

    internal static TestResult Binary(Sides sides)
    {
        (double First, double Second, TreatmentSequence Sequence, int Subjects)[] table =
        [
            (1, 0, TreatmentSequence.IndexFirst, 9), (0, 1, TreatmentSequence.IndexFirst, 3), (1, 1, TreatmentSequence.IndexFirst, 4),
            (1, 0, TreatmentSequence.ReferenceFirst, 4), (0, 1, TreatmentSequence.ReferenceFirst, 11), (0, 0, TreatmentSequence.ReferenceFirst, 6),
        ];
        var rows = table.SelectMany(row => Enumerable.Repeat(row, row.Subjects)).ToArray();
        double[] first = [.. rows.Select(row => row.First)], second = [.. rows.Select(row => row.Second)];
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var sample = CrossoverSample.Of(first, second, rows.Select(row => row.Sequence).ToArray(), frame);
        return MainlandGart.Run(sample, new TestOptions { Sides = sides }, scratch);
    }

    internal static (TestResult Treatment, TestResult Period, TestResult CarryOver) Invented() =>
        (Run(CrossoverT.Run), Run(CrossoverT.Period), Run(CrossoverT.CarryOver));

    private static TestResult Run(Method method)
    {
        TreatmentSequence[] sequences =
            [.. Enumerable.Repeat(TreatmentSequence.IndexFirst, 6), .. Enumerable.Repeat(TreatmentSequence.ReferenceFirst, 5)];
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return method(CrossoverSample.Of(First, Second, sequences, frame), TestOptions.Default, scratch);
    }

    private static void Check(Method method, double estimate, double error, double t, double p, double low, double high)
    {
        var result = Run(method);
        Assert.Equal(1, result.Estimate / estimate, 1e-12);
        Assert.Equal(1, result.StandardError / error, 1e-12);
        Assert.Equal(1, result.Statistic / t, 1e-12);
        Assert.Equal(9, result.DegreesOfFreedom);
        Assert.Equal(1, result.P.Value / p, 1e-11);
        Assert.Equal(1, result.Interval.Low / low, 1e-11);
        Assert.Equal(1, result.Interval.High / high, 1e-11);
    }
}
