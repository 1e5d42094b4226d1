using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Reference.Tests;

/// <summary>
/// Unaided vision of the right and the left eye in four grades, 7477 women (Stuart 1955). Expected numbers: exact fractions and
/// base R 4.2.2 (Inputs/README.md).
/// </summary>
public class OrdinalPairsTests
{
    [Fact]
    public void Symmetry_and_marginal_homogeneity_of_the_vision_table_agree()
    {
        var (index, reference) = Eyes();
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var pairs = PairSample.Of(index, reference, frame);
        Assert.Equal(7477, pairs.Count);
        Check(StuartMaxwell.Run(pairs, TestOptions.Default, scratch), "stuart_maxwell");
        Check(Bowker.Run(pairs, TestOptions.Default, scratch), "bowker");
    }

    private static void Check(TestResult result, string @case)
    {
        Expected.Check(result.Statistic, "vision_4x4", @case, "chi2");
        Expected.Check(result.DegreesOfFreedom, "vision_4x4", @case, "df");
        Expected.Check(result.P.Value, "vision_4x4", @case, "p");
    }

    internal static (double[] Index, double[] Reference) Eyes()
    {
        var table = Expected.Table("vision_4x4");
        double[] right = table.Numbers("right"), left = table.Numbers("left"), counts = table.Numbers("count");
        return ([.. right.SelectMany((grade, row) => Enumerable.Repeat(grade, (int)counts[row]))],
            [.. left.SelectMany((grade, row) => Enumerable.Repeat(grade, (int)counts[row]))]);
    }
}
