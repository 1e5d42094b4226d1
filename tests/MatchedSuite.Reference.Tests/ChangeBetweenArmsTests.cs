using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Arms;

namespace MatchedSuite.Reference.Tests;

/// <summary>
/// Weight of girls before and after treatment of anorexia (Hand et al. 1994): changes compared between arms. Values: exact
/// fractions and 50-digit tails, base R 4.2.2 (t.test, lm).
/// </summary>
public class ChangeBetweenArmsTests
{
    internal delegate TestResult Method(in ArmSample sample, TestOptions options, Scratch scratch);

    [Theory]
    [InlineData("CBT")]
    [InlineData("FT")]
    public void Welch_on_changes_gives_every_number_of_the_reference(string arm)
    {
        string dataset = $"anorexia_{arm}_vs_Cont";
        var two = Run(ChangeWelch.Run, arm, Sides.Two);
        int count = CheckT(two, dataset, "change_welch_t");
        count += CheckOneSided(ChangeWelch.Run, arm, dataset, "change_welch_t");
        Assert.Equal(9, count);
    }

    [Theory]
    [InlineData("CBT")]
    [InlineData("FT")]
    public void The_pooled_t_on_changes_gives_every_number_of_the_reference(string arm)
    {
        string dataset = $"anorexia_{arm}_vs_Cont";
        static TestResult Pooled(in ArmSample sample, TestOptions options, Scratch scratch) =>
            TwoSampleT.Pooled(sample.IndexChanges, sample.ReferenceChanges, 0, options, scratch);
        int count = CheckT(Run(Pooled, arm, Sides.Two), dataset, "change_pooled_t");
        count += CheckOneSided(Pooled, arm, dataset, "change_pooled_t");
        Assert.Equal(9, count);
    }

    [Theory]
    [InlineData("CBT")]
    [InlineData("FT")]
    public void The_analysis_of_covariance_gives_every_number_of_the_reference(string arm)
    {
        string dataset = $"anorexia_{arm}_vs_Cont";
        var result = Run(ChangeAncova.Run, arm, Sides.Two);
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var fit = ChangeAncova.Fit(Anorexia(arm, frame), scratch);
        (string Quantity, double Value)[] numbers =
        [
            ("coef.arm", result.Estimate), ("se.arm", result.StandardError), ("t.arm", result.Statistic),
            ("df", result.DegreesOfFreedom), ("p.arm", result.P.Value), ("ci95_lo.arm", result.Interval.Low),
            ("ci95_hi.arm", result.Interval.High), ("coef.before", fit.BaselineSlope), ("se.before", fit.BaselineError),
            ("coef.intercept", fit.Intercept),
        ];
        foreach (var (quantity, value) in numbers)
            Expected.Check(value, dataset, "ancova", quantity);
        Assert.Equal(10, numbers.Length);
    }

    /// <summary>Base R 4.2.2: wilcox.test(exact = FALSE, correct = TRUE) on changes rounded to 10 digits; median and order statistics of outer().</summary>
    [Theory]
    [InlineData("CBT", 472, 0.11112510920356809, 0.055562554601784046, 0.94630273087876915, 3.05, -0.6, 8.1)]
    [InlineData("FT", 336, 0.0044509455453428867, 0.0022254727726714434, 0.99794204313001444, 8, 2.8, 13.2)]
    public void The_rank_sum_with_tied_changes_gives_the_numbers_of_base_R(
        string arm, double u, double two, double greater, double less, double shift, double low, double high)
    {
        var result = Run(ChangeRankSum.Run, arm, Sides.Two);
        Assert.Equal(u, result.Statistic);
        Assert.Equal(1, result.P.Value / two, 1e-12);
        Assert.Equal(1, Run(ChangeRankSum.Run, arm, Sides.Greater).P.Value / greater, 1e-12);
        Assert.Equal(1, Run(ChangeRankSum.Run, arm, Sides.Less).P.Value / less, 1e-12);
        Assert.Equal(shift, result.Estimate, 1e-12);
        Assert.Equal(low, result.Interval.Low, 1e-12);
        Assert.Equal(high, result.Interval.High, 1e-12);
        Assert.Equal(Remarks.Ties, result.Remarks);
    }

    /// <summary>
    /// Permeability constants of a membrane at term and at 12 to 26 weeks (Hollander &amp; Wolfe 1973, p. 69), taken as changes.
    /// Base R 4.2.2: wilcox.test(exact = TRUE, conf.int = TRUE).
    /// </summary>
    [Theory]
    [InlineData(Sides.Two, 0.2544122544122544, -0.15, 0.76)]
    [InlineData(Sides.Greater, 0.1272061272061272, -0.08, double.PositiveInfinity)]
    [InlineData(Sides.Less, 0.89676989676989671, double.NegativeInfinity, 0.72)]
    public void The_exact_rank_sum_without_ties_gives_the_numbers_of_base_R(Sides sides, double p, double low, double high)
    {
        double[] changes = [0.80, 0.83, 1.89, 1.04, 1.45, 1.38, 1.91, 1.64, 0.73, 1.46, 1.15, 0.88, 0.90, 0.74, 1.21];
        Arm[] arms = [.. Enumerable.Repeat(Arm.Index, 10), .. Enumerable.Repeat(Arm.Reference, 5)];
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var result = ChangeRankSum.Run(ArmSample.OfChanges(changes, arms, frame), new TestOptions { Sides = sides }, scratch);
        Assert.Equal(35, result.Statistic);
        Assert.Equal(1, result.P.Value / p, 1e-13);
        Assert.Equal(0.305, result.Estimate, 1e-14);
        Close(low, result.Interval.Low);
        Close(high, result.Interval.High);
        Assert.Equal(Remarks.Exact, result.Remarks);
    }

    private static void Close(double expected, double found) =>
        Assert.True(expected.Equals(found) || Math.Abs(expected - found) <= 1e-13, $"expected {expected:R}, found {found:R}");

    private static int CheckT(TestResult result, string dataset, string @case)
    {
        (string Quantity, double Value)[] numbers =
        [
            ("diff", result.Estimate), ("se", result.StandardError), ("t", result.Statistic), ("df", result.DegreesOfFreedom),
            ("p_two", result.P.Value), ("ci95_lo", result.Interval.Low), ("ci95_hi", result.Interval.High),
        ];
        foreach (var (quantity, value) in numbers)
            Expected.Check(value, dataset, @case, quantity);
        return numbers.Length;
    }

    private static int CheckOneSided(Method method, string arm, string dataset, string @case)
    {
        Expected.Check(Run(method, arm, Sides.Greater).P.Value, dataset, @case, "p_greater");
        Expected.Check(Run(method, arm, Sides.Less).P.Value, dataset, @case, "p_less");
        return 2;
    }

    internal static TestResult Run(Method method, string arm, Sides sides)
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return method(Anorexia(arm, frame), new TestOptions { Sides = sides }, scratch);
    }

    private static ArmSample Anorexia(string arm, in Scratch.Frame frame)
    {
        var table = Expected.Table("anorexia");
        string[] treatments = table.Texts("treatment");
        double[] before = table.Numbers("before"), after = table.Numbers("after");
        int[] rows = [.. Enumerable.Range(0, table.Rows).Where(row => treatments[row] == arm || treatments[row] == "Cont")];
        double[] baseline = [.. rows.Select(row => before[row])], followUp = [.. rows.Select(row => after[row])];
        Arm[] arms = [.. rows.Select(row => treatments[row] == arm ? Arm.Index : Arm.Reference)];
        return ArmSample.Of(baseline, followUp, arms, frame);
    }
}
