using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Reference.Tests;

/// <summary>Friedman's test, Kendall's W, Iman and Davenport's F. Values: exact fractions and 50-digit tails, base R 4.2.2 friedman.test, SciPy.</summary>
public class FriedmanTests
{
    [Theory]
    [InlineData("ergostool")]
    [InlineData("orthodont")]
    [InlineData("sleepstudy")]
    [InlineData("rounding_times")]
    [InlineData("warpbreaks_means")]
    [InlineData("cotton_page")]
    [InlineData("teaching_page")]
    public void Every_number_is_that_of_the_reference(string dataset)
    {
        var table = Of(dataset);
        var fit = Friedman.Fit(table.Sample(), new Scratch());
        (string Quantity, double Value)[] numbers =
        [
            ("n", fit.Subjects), ("k", fit.Visits), ("chi2", fit.ChiSquared), ("df", fit.DegreesOfFreedom),
            ("p", fit.ChiSquaredP.Value), ("kendall_W", fit.KendallW), ("iman_davenport_F", fit.ImanDavenportF),
            ("iman_davenport_df1", fit.DegreesOfFreedom), ("iman_davenport_df2", (fit.Subjects - 1) * fit.DegreesOfFreedom),
            ("iman_davenport_p", fit.ImanDavenportP.Value),
        ];
        foreach (var (quantity, value) in numbers)
            Expected.Check(value, dataset, "friedman", quantity);
        Assert.Equal(10, numbers.Length);
    }

    private static VisitTables Of(string dataset) => dataset switch
    {
        "ergostool" => VisitTables.ErgoStool(),
        "orthodont" => VisitTables.Orthodont(),
        "sleepstudy" => VisitTables.SleepStudy(),
        "warpbreaks_means" => VisitTables.WarpBreaks(),
        "cotton_page" => VisitTables.Cotton(),
        "teaching_page" => VisitTables.Teaching(),
        _ => VisitTables.RoundingTimes(),
    };
}
