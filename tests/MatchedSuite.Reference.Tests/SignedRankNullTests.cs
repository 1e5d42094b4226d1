using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Reference.Tests;

/// <summary>Exact null of the signed-rank sum for n = 1 to 60, counted in integers (Inputs/signed_rank_null.csv).</summary>
public class SignedRankNullTests
{
    [Fact]
    public void All_rows_of_the_table_agree_to_1e_13()
    {
        var table = ReferenceTable.Read("signed_rank_null.csv");
        var (n, w) = (table.Numbers("n"), table.Numbers("w"));
        var (tail, log10) = (table.Numbers("upper_tail"), table.Numbers("log10_upper_tail"));
        for (int row = 0; row < table.Rows; row++)
        {
            var actual = SignedRankNull.Of((int)n[row]).AtLeast((long)w[row]);
            Assert.True(Math.Abs(actual.Value - tail[row]) <= 1e-13 * tail[row], $"n = {n[row]}, w = {w[row]}: {actual.Value:R}, expected {tail[row]:R}.");
            Assert.Equal(log10[row], actual.Log10, tolerance: 1e-13 * Math.Max(1, Math.Abs(log10[row])));
        }

        Assert.Equal(1588, table.Rows);
    }
}
