using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Statistics.Strata;

namespace MatchedSuite.Reference.Tests;

/// <summary>
/// Weight before and after three treatments of anorexia (Hand et al. 1994) as three strata of pairs: Welch's t of changes is the test between two
/// strata. Expected numbers: Inputs/README.md, and base R 4.2.2 oneway.test and fisher.test where said.
/// </summary>
public class StratumDifferenceTests
{
    [Theory]
    [InlineData("CBT")]
    [InlineData("FT")]
    public void Two_strata_of_differences_give_the_t_of_Welch(string treatment)
    {
        string dataset = $"anorexia_{treatment}_vs_Cont";
        TestResult Compared(Sides sides)
        {
            var options = new TestOptions { Sides = sides };
            return StratumDifference.OfMeans([Treated(treatment, options), Treated("Cont", options)], options);
        }

        var two = Compared(Sides.Two);
        Expected.Check(two.Estimate, dataset, "change_welch_t", "diff");
        Expected.Check(two.StandardError, dataset, "change_welch_t", "se");
        Expected.Check(two.Statistic, dataset, "change_welch_t", "t");
        Expected.Check(two.DegreesOfFreedom, dataset, "change_welch_t", "df");
        Expected.Check(two.P.Value, dataset, "change_welch_t", "p_two");
        Expected.Check(two.Interval.Low, dataset, "change_welch_t", "ci95_lo");
        Expected.Check(two.Interval.High, dataset, "change_welch_t", "ci95_hi");
        Expected.Check(Compared(Sides.Greater).P.Value, dataset, "change_welch_t", "p_greater");
        Expected.Check(Compared(Sides.Less).P.Value, dataset, "change_welch_t", "p_less");
    }

    [Fact]
    public void Three_strata_give_the_analysis_of_variance_of_Welch()
    {
        var result = StratumDifference.OfMeans(
            [Treated("CBT", TestOptions.Default), Treated("Cont", TestOptions.Default), Treated("FT", TestOptions.Default)], TestOptions.Default);
        // base R 4.2.2: oneway.test(after - before ~ treatment)
        Assert.Equal(5.355441712688037, result.Statistic, tolerance: 1e-12);
        Assert.Equal(2, result.DegreesOfFreedom);
        Assert.Equal(41.13588311889206, result.DenominatorDegreesOfFreedom, tolerance: 1e-11);
        Assert.Equal(0.008568491411716311, result.P.Value, tolerance: 1e-14);
    }

    [Theory]
    // base R 4.2.2: fisher.test(alternative = "greater") and "less"; the first row of the second table is Fisher's tea tasting, 17/70.
    [InlineData(15, 7, 29, 3, 0.99268011760637387, 0.04266768979037495)]
    [InlineData(3, 1, 1, 3, 17.0 / 70, 0.9857142857142858)]
    [InlineData(150, 86, 40, 12, 0.97968766170079402, 0.04408219838631196)]
    public void Discordant_pairs_of_two_strata_give_the_exact_tails_of_Fisher(int b, int c, int otherB, int otherC, double greater, double less)
    {
        PairedTable first = new(2, b, c, 1), second = new(0, otherB, otherC, 5);
        Assert.Equal(greater, DiscordanceDifference.Run(first, second, Sides.Greater).P.Value, tolerance: 1e-12 * greater);
        Assert.Equal(less, DiscordanceDifference.Run(first, second, Sides.Less).P.Value, tolerance: 1e-12 * less);
        Assert.Equal(2 * Math.Min(greater, less), DiscordanceDifference.Run(first, second, Sides.Two).P.Value, tolerance: 1e-12);
    }

    [Fact]
    public void The_page_on_strata_shows_what_is_computed()
    {
        TestResult control = Treated("Cont", TestOptions.Default), family = Treated("FT", TestOptions.Default);
        var two = StratumDifference.OfMeans([family, control], TestOptions.Default);
        var normal = StratumDifference.OfEstimates([family, control], TestOptions.Default);
        var three = StratumDifference.OfMeans([Treated("CBT", TestOptions.Default), control, family], TestOptions.Default);
        var exact = DiscordanceDifference.Run(new PairedTable(0, 15, 7, 0), new PairedTable(0, 29, 3, 0), Sides.Two);
        var page = MethodPage.Of("strata");
        page.Shows("two strata: difference, interval", $"{two.Estimate}, {two.Interval.Low} to {two.Interval.High}");
        page.Shows("two strata: t, df, p", $"{two.Statistic}, {two.DegreesOfFreedom}, {two.P.Value}");
        page.Shows("the same by standard errors alone: z, p", $"{normal.Statistic}, {normal.P.Value}");
        page.Shows("three strata: F, df, df2, p",
            $"{three.Statistic}, {three.DegreesOfFreedom}, {three.DenominatorDegreesOfFreedom}, {three.P.Value}");
        page.Shows("discordant pairs: difference of log odds, p", $"{exact.Estimate}, {exact.P.Value}");
    }

    private static TestResult Treated(string treatment, TestOptions options)
    {
        var table = Expected.Table("anorexia");
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return PairedT.Run(PairSample.Of(
            table.Numbers("after", "treatment", treatment), table.Numbers("before", "treatment", treatment), frame), options, scratch);
    }
}
