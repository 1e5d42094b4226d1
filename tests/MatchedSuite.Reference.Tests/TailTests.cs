using System.Globalization;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Reference.Tests;

/// <summary>Upper tails against Inputs/tails.csv: mpmath 1.2.1, continued fractions at 50 digits, checked against base R 4.2.2.</summary>
public class TailTests
{
    private const double ValueTolerance = 1e-12;
    private const double Log10Tolerance = 1e-9;

    // Below this the table's doubles are subnormal or 0; there the logarithm is the answer.
    private const double SmallestValueCompared = -300;

    [Theory]
    [InlineData("t", 440)]
    [InlineData("normal", 28)]
    [InlineData("chisq", 182)]
    [InlineData("F", 132)]
    [InlineData("binom_ge", 450)]
    public void Every_tail_of_the_table_agrees_in_its_digits_and_in_its_logarithm(string distribution, int rows)
    {
        var table = ReferenceTable.Read("tails.csv");
        string[] names = table.Texts("dist");
        double[] first = table.Numbers("par1"), second = table.Numbers("par2"), x = table.Numbers("x");
        double[] values = table.Numbers("upper_tail"), logarithms = table.Numbers("log10_upper_tail");
        var failures = new List<string>();
        int compared = 0;
        for (int i = 0; i < table.Rows; i++)
        {
            if (names[i] != distribution)
                continue;
            compared++;
            Probability tail = Upper(distribution, x[i], first[i], second[i]);
            bool agrees = Math.Abs(tail.Log10 - logarithms[i]) <= Log10Tolerance
                && (logarithms[i] < SmallestValueCompared || Math.Abs(tail.Value / values[i] - 1) <= ValueTolerance);
            if (!agrees)
                failures.Add(string.Create(CultureInfo.InvariantCulture,
                    $"{distribution}({first[i]}, {second[i]}) at {x[i]}: expected {values[i]:R} (log10 {logarithms[i]:R}), found {tail.Value:R} (log10 {tail.Log10:R})"));
        }
        Assert.Equal(rows, compared);
        Assert.True(failures.Count == 0, string.Join('\n', failures));
    }

    private static Probability Upper(string distribution, double x, double first, double second) => distribution switch
    {
        "t" => StudentT.UpperTail(x, first),
        "normal" => StandardNormal.UpperTail(x),
        "chisq" => ChiSquared.UpperTail(x, first),
        "F" => FisherF.UpperTail(x, first, second),
        "binom_ge" => Binomial.UpperTail((long)x, (long)first, second),
        _ => throw new ArgumentException($"The table has no distribution '{distribution}'."),
    };
}
