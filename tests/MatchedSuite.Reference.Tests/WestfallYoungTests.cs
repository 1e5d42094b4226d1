using MatchedSuite.Statistics.Multiplicity.Resampling;

namespace MatchedSuite.Reference.Tests;

/// <summary>
/// Eight invented pairs on five endpoints, all 256 flips of whole rows listed: exact rational enumeration, base R and NumPy
/// (Inputs/README.md).
/// </summary>
public class WestfallYoungTests
{
    private const string Dataset = "westfall_young_8x5";
    private const string Case = "westfall_young.abs_t";

    private static readonly double[] Differences =
        [.. Enumerable.Range(1, 5).SelectMany(endpoint => Expected.Table(Dataset).Numbers($"e{endpoint}"))];

    [Fact]
    public void Max_t_gives_the_exact_step_down_and_single_step_p_values()
    {
        var result = MaxT.Run(new DifferenceTable(Differences, 8), new ResamplingOptions { Resamples = 999 });
        Assert.True(result.Exhaustive);
        Assert.Equal(255, result.Flips);
        for (int endpoint = 1; endpoint <= 5; endpoint++)
        {
            Expected.Check(result.StepDown[endpoint - 1].Value, Dataset, Case, $"step_down_maxT.e{endpoint}");
            Expected.Check(result.SingleStep[endpoint - 1].Value, Dataset, Case, $"single_step_maxT.e{endpoint}");
        }
    }

    [Fact]
    public void Min_p_gives_the_exact_step_down_p_values()
    {
        var result = MinP.Run(new DifferenceTable(Differences, 8), new ResamplingOptions { Resamples = 255 });
        Assert.True(result.Exhaustive);
        for (int endpoint = 1; endpoint <= 5; endpoint++)
            Expected.Check(result.StepDown[endpoint - 1].Value, Dataset, Case, $"step_down_minP.e{endpoint}");
    }

    [Fact]
    public void One_endpoint_alone_keeps_its_exact_marginal_p_value()
    {
        for (int endpoint = 1; endpoint <= 5; endpoint++)
        {
            var alone = new DifferenceTable(Differences.AsMemory((endpoint - 1) * 8, 8), 8);
            Expected.Check(MaxT.Run(alone, new ResamplingOptions()).StepDown[0].Value, Dataset, Case, $"raw_p.e{endpoint}");
            Expected.Check(MinP.Run(alone, new ResamplingOptions()).StepDown[0].Value, Dataset, Case, $"raw_p.e{endpoint}");
        }
    }

    [Fact]
    public void The_critical_value_separates_the_endpoints_at_the_level()
    {
        // Single-step p is 0.047 for e1 and 0.266 or more for the others.
        var result = MaxT.Run(new DifferenceTable(Differences, 8), new ResamplingOptions { Level = 0.05 });
        for (int endpoint = 1; endpoint <= 5; endpoint++)
        {
            double t = Math.Sqrt(Expected.Value(Dataset, Case, $"t2.e{endpoint}"));
            Assert.Equal(result.SingleStep[endpoint - 1].IsAtMost(0.05), t > result.CriticalValue);
        }
    }
}
