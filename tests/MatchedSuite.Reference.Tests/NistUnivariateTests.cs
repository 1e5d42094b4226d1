using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Reference.Tests;

/// <summary>NIST Statistical Reference Datasets, univariate summary statistics: certified mean and standard deviation to 15 digits.</summary>
public class NistUnivariateTests
{
    private static readonly string[] Sets =
        ["NumAcc1", "NumAcc2", "NumAcc3", "NumAcc4", "Lew", "Lottery", "Mavro", "Michelso", "PiDigits"];

    [Fact]
    public void Mean_and_deviation_of_all_nine_sets_have_the_digits_that_doubles_permit()
    {
        int compared = 0;
        foreach (string name in Sets)
        {
            double[] values = Expected.Table("nist_" + name).Numbers("y");
            var result = Test(values, new double[values.Length]);
            CheckAgainstCertified(name, values, result, offset: 0);
            compared += 3;
        }

        Assert.Equal(27, compared);
    }

    [Fact]
    public void Differences_from_the_certified_mean_keep_the_certified_deviation()
    {
        foreach (string name in Sets)
        {
            double[] values = Expected.Table("nist_" + name).Numbers("y");
            double mean = Expected.Value("nist_" + name, "univariate", "mean");
            var reference = new double[values.Length];
            Array.Fill(reference, mean);
            CheckAgainstCertified(name, values, Test(values, reference), mean);
        }
    }

    private static void CheckAgainstCertified(string name, double[] values, TestResult result, double offset)
    {
        string dataset = "nist_" + name;
        double deviation = Expected.Value(dataset, "univariate", "sd");
        // A decimal is stored within half a unit in the last place; that moves mean and deviation by at most as much.
        double largest = values.Max(Math.Abs);
        double unit = Math.BitIncrement(largest) - largest;
        Expected.Check(result.Sets, dataset, "univariate", "n");
        Expected.Check(offset + result.Estimate, dataset, "univariate", "mean", unit / largest);
        Expected.Check(result.StandardError * Math.Sqrt(values.Length), dataset, "univariate", "sd", unit / deviation);
    }

    private static TestResult Test(double[] index, double[] reference)
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return PairedT.Run(PairSample.Of(index, reference, frame), TestOptions.Default, scratch);
    }
}
