using System.Globalization;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Reference.Tests;

/// <summary>Upper quantiles against Inputs/quantiles.csv, tails from 0.25 to 1e-1000: mpmath 1.2.1 at 50 digits.</summary>
public class QuantileTests
{
    // An answer above the largest double (Student's t with 1 df at 1e-1000 is near 3e999) must come as infinity.
    private const double Log10OfLargestDouble = 308.2547155599167;

    [Theory]
    [InlineData("t", 289)]
    [InlineData("normal", 17)]
    [InlineData("chisq", 85)]
    [InlineData("F", 48)]
    public void Every_quantile_of_the_table_agrees_to_twelve_digits(string distribution, int rows)
    {
        var table = ReferenceTable.Read("quantiles.csv");
        string[] names = table.Texts("dist");
        double[] first = table.Numbers("par1"), second = table.Numbers("par2"), logTails = table.Numbers("log10_upper_p");
        double[] tails = table.Numbers("upper_p"), quantiles = table.Numbers("quantile"), logQuantiles = table.Numbers("log10_quantile");
        var failures = new List<string>();
        int compared = 0;
        for (int i = 0; i < table.Rows; i++)
        {
            if (names[i] != distribution)
                continue;
            compared++;
            Probability tail = logTails[i] > -300 ? Probability.Of(tails[i]) : Probability.FromLog10(logTails[i]);
            double found = Quantile(distribution, tail, first[i], second[i]);
            bool agrees = logQuantiles[i] > Log10OfLargestDouble
                ? double.IsPositiveInfinity(found)
                : Math.Abs(found / quantiles[i] - 1) <= 1e-12;
            if (!agrees)
                failures.Add(string.Create(CultureInfo.InvariantCulture,
                    $"{distribution}({first[i]}, {second[i]}) at log10 p = {logTails[i]}: expected {quantiles[i]:R}, found {found:R}, off by {found / quantiles[i] - 1:G3}"));
        }
        Assert.Equal(rows, compared);
        Assert.True(failures.Count == 0, string.Join('\n', failures));
    }

    private static double Quantile(string distribution, Probability tail, double first, double second) => distribution switch
    {
        "t" => StudentT.UpperQuantile(tail, first),
        "normal" => StandardNormal.UpperQuantile(tail),
        "chisq" => ChiSquared.UpperQuantile(tail, first),
        "F" => FisherF.UpperQuantile(tail, first, second),
        _ => throw new ArgumentException($"The table has no distribution '{distribution}'."),
    };
}
