using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Reference.Tests;

/// <summary>
/// The McNemar family on published 2 × 2 tables of pairs: Agresti (2002) section 10.1, Johnson and Johnson (1972), Breslow and Day
/// (1980), Hammond (1964), and two invented ones. Expected numbers: base R 4.2.2 and mpmath at 50 digits (Inputs/README.md).
/// </summary>
public class McNemarTests
{
    private static readonly Dictionary<string, PairedTable> Counts = new()
    {
        ["approval_2x2"] = new(794, 150, 86, 570),
        ["hodgkin_2x2"] = new(26, 15, 7, 37),
        ["endometrial_1to1_est"] = new(27, 29, 3, 4),
        ["zero_cell"] = new(43, 0, 1, 0),
        ["equal_discordant"] = new(10, 6, 6, 20),
    };

    // The other convention of the same quantity, listed in the reference for comparison.
    private static readonly string[] OtherConventions = [
        "p_mid_alternative_definition", "p_corrected_statsmodels_when_b_equals_c", "bonett_price95_lo", "bonett_price95_hi"];

    private static readonly Dictionary<string, Func<PairedTable, double>> Measures = new()
    {
        ["b"] = t => McNemarExact.Run(t, TestOptions.Default).Statistic,
        ["c"] = t => t.Discordant - McNemarExact.Run(t, TestOptions.Default).Statistic,
        ["chi2"] = t => McNemar.Run(t, TestOptions.Default).Statistic,
        ["p_chi2"] = t => McNemar.Run(t, TestOptions.Default).P.Value,
        ["chi2_corrected"] = t => McNemarCorrected.Run(t, TestOptions.Default).Statistic,
        ["p_corrected"] = t => McNemarCorrected.Run(t, TestOptions.Default).P.Value,
        ["p_exact"] = t => McNemarExact.Run(t, TestOptions.Default).P.Value,
        ["p_exact_greater"] = t => McNemarExact.Run(t, new TestOptions { Sides = Sides.Greater }).P.Value,
        ["p_exact_less"] = t => McNemarExact.Run(t, new TestOptions { Sides = Sides.Less }).P.Value,
        ["p_mid"] = t => McNemarMidP.Run(t, TestOptions.Default).P.Value,
        ["or"] = t => Math.Exp(McNemarExact.Run(t, TestOptions.Default).Estimate),
        ["exact95_lo"] = t => Math.Exp(McNemarExact.Run(t, TestOptions.Default).Interval.Low),
        ["exact95_hi"] = t => Math.Exp(McNemarExact.Run(t, TestOptions.Default).Interval.High),
        ["wald95_lo"] = t => Wald(McNemar.Run(t, TestOptions.Default), -1),
        ["wald95_hi"] = t => Wald(McNemar.Run(t, TestOptions.Default), 1),
        ["diff"] = t => RiskDifference.Of(t),
        ["newcombe95_lo"] = t => RiskDifference.SquareAndAddUncorrected(t, TestOptions.Default).Low,
        ["newcombe95_hi"] = t => RiskDifference.SquareAndAddUncorrected(t, TestOptions.Default).High,
        ["newcombe10_95_lo"] = t => RiskDifference.SquareAndAdd(t, TestOptions.Default).Low,
        ["newcombe10_95_hi"] = t => RiskDifference.SquareAndAdd(t, TestOptions.Default).High,
        ["tango95_lo"] = t => RiskDifference.Score(t, TestOptions.Default).Low,
        ["tango95_hi"] = t => RiskDifference.Score(t, TestOptions.Default).High,
    };

    [Theory]
    [InlineData("mcnemar", 5 * 10)]
    [InlineData("matched_or", (4 * 5) + 3)]
    [InlineData("risk_difference", 5 * 7)]
    public void Every_quantity_of_every_table_agrees(string @case, int quantities)
    {
        var table = ReferenceTable.Read("expected.csv");
        var (datasets, cases, names) = (table.Texts("dataset"), table.Texts("case"), table.Texts("quantity"));
        int compared = 0;
        for (int row = 0; row < table.Rows; row++)
        {
            if (cases[row] != @case || OtherConventions.Contains(names[row]) || (@case == "risk_difference" && names[row].StartsWith("wald", StringComparison.Ordinal)))
                continue;
            Expected.Check(Measures[names[row]](Counts[datasets[row]]), datasets[row], @case, names[row]);
            compared++;
        }

        Assert.Equal(quantities, compared);
    }

    [Fact]
    public void Smoking_and_lung_cancer_deaths_of_Hammond_1964_give_the_exact_one_sided_p()
    {
        var result = McNemarExact.Run(new PairedTable(0, 110, 12, 0), new TestOptions { Sides = Sides.Greater });
        Expected.Check(result.P.Value, "hammond_discordant", "rosenbaum_mcnemar", "p_upper.gamma1");
    }

    [Fact]
    public void The_approval_table_in_the_data_file_is_the_one_that_is_tested()
    {
        double[] counts = Expected.Table("approval_2x2").Numbers("count");
        Assert.Equal([794, 150, 86, 570], counts);
    }

    private static double Wald(TestResult result, int sign) =>
        Math.Exp(result.Estimate + (sign * StandardNormal.UpperQuantile(0.025) * result.StandardError));
}
