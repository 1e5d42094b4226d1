using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Reference.Tests;

/// <summary>Cochran's Q. Values: exact fractions, base R and statsmodels; Q = 8.4706, p = 0.0145 in print.</summary>
public class CochranQTests
{
    [Fact]
    public void Three_drugs_of_Grizzle_Starmer_and_Koch_1969_give_every_number_of_the_reference()
    {
        var result = CochranQ.Run(ThreeDrugs(), TestOptions.Default, new Scratch());
        Expected.Check(result.Sets, "three_drugs_cochran", "cochran_q", "n");
        Expected.Check(result.Samples / result.Sets, "three_drugs_cochran", "cochran_q", "k");
        Expected.Check(result.Statistic, "three_drugs_cochran", "cochran_q", "Q");
        Expected.Check(result.DegreesOfFreedom, "three_drugs_cochran", "cochran_q", "df");
        Expected.Check(result.P.Value, "three_drugs_cochran", "cochran_q", "p");
    }

    internal static VisitSample ThreeDrugs()
    {
        var table = Expected.Table("three_drugs_cochran");
        double[] a = table.Numbers("drugA"), b = table.Numbers("drugB"), c = table.Numbers("drugC"), counts = table.Numbers("count");
        double[] values = [.. Enumerable.Range(0, table.Rows).SelectMany(row =>
            Enumerable.Repeat(new[] { a[row], b[row], c[row] }, (int)counts[row]).SelectMany(signs => signs))];
        return VisitSample.Of(values, new double[] { 0, 1, 2 });
    }
}
