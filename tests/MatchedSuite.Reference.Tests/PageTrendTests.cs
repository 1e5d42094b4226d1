using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Reference.Tests;

/// <summary>Page's trend test. Values: exact convolution of rearrangements in fractions, 50-digit normal tails, base R and SciPy.</summary>
public class PageTrendTests
{
    [Theory]
    [InlineData("orthodont", 8)]
    [InlineData("cotton_page", 9)]
    [InlineData("teaching_page", 8)]
    [InlineData("teaching_page_reordered", 8)]
    [InlineData("sleepstudy", 7)]
    public void Every_number_is_that_of_the_reference(string dataset, int count)
    {
        var table = Of(dataset);
        var fit = PageTrend.Fit(table.Sample(), new Scratch());
        List<(string Quantity, double Value)> numbers =
        [
            ("n", fit.Subjects), ("k", fit.Visits), ("L", fit.L), ("mean", fit.Mean), ("sd_ties", fit.StandardDeviation),
            ("z_ties", fit.Z), ("p_greater_normal_ties", fit.NormalUpper.Value),
        ];
        if (!fit.ExactUpper.IsMissing)
            numbers.Add(("p_greater_exact_conditional", fit.ExactUpper.Value));
        if (!fit.HasTies && !fit.ExactUpper.IsMissing)
            numbers.Add(("p_greater_exact_noties", fit.ExactUpper.Value));
        foreach (var (quantity, value) in numbers)
            Expected.Check(value, dataset, "page", quantity);
        Assert.Equal(count, numbers.Count);
    }

    [Theory]
    [InlineData(Sides.Greater, 1)]
    [InlineData(Sides.Two, 2)]
    public void Cotton_strength_gives_the_exact_p_of_the_table(Sides sides, int factor)
    {
        var result = PageTrend.Run(VisitTables.Cotton().Sample(), new TestOptions { Sides = sides }, new Scratch());
        Assert.Equal(158, result.Statistic);
        Assert.True(result.Remarks.HasFlag(Remarks.Exact));
        Expected.Check(result.P.Value / factor, "cotton_page", "page", "p_greater_exact_noties");
    }

    private static VisitTables Of(string dataset) => dataset switch
    {
        "orthodont" => VisitTables.Orthodont(),
        "sleepstudy" => VisitTables.SleepStudy(),
        "cotton_page" => VisitTables.Cotton(),
        "teaching_page_reordered" => VisitTables.Wide("teaching_page", "tutorial", "seminar", "lecture"),
        _ => VisitTables.Teaching(),
    };
}
