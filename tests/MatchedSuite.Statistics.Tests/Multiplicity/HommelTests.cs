using System.Numerics;
using CsCheck;
using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Statistics.Tests.Multiplicity;

public class HommelTests
{
    [Fact]
    public void Adjusted_p_values_equal_closed_testing_with_Simes_tests_over_all_subsets() =>
        PValueVectors.CompleteUpTo(9).Sample(p =>
        {
            var fast = PValueVectors.Adjusted(Hommel.Adjust, p);
            var closed = LargestOverSubsets(p);
            for (int i = 0; i < p.Length; i++)
                Assert.True(PValueVectors.Close(fast[i], closed[i]), $"{string.Join(" ", p)}: {fast[i]} against {closed[i]}");
        }, iter: 400);

    [Fact]
    public void Twenty_thousand_hypotheses_agree_with_the_quadratic_definition_at_chosen_places()
    {
        const int M = 20_000;
        var p = new Probability[M];
        for (int i = 0; i < M; i++)
            p[i] = Probability.Of(Math.Pow((i + 0.5) / M, i % 3 == 0 ? 4 : 1));
        var fast = PValueVectors.Adjusted(Hommel.Adjust, p);
        double[] sorted = [.. p.Select(one => one.Value).Order()];
        double[] simes = new double[M + 2];
        for (int k = 1; k <= M; k++)
        {
            double least = double.PositiveInfinity;
            for (int j = 1; j <= k; j++)
                least = Math.Min(least, sorted[M - k + j - 1] / j);
            simes[k] = k * least;
        }

        foreach (int at in new[] { 0, 3, 6, 9, 300, 3_000, 9_999, 19_999 })
        {
            double best = 1;
            for (int k = 1; k <= M; k++)
                best = Math.Min(best, Math.Max(simes[k + 1], k * p[at].Value));
            Assert.Equal(best, fast[at].Value, 1e-13 * best);
        }
    }

    private static Probability[] LargestOverSubsets(Probability[] p)
    {
        var largest = new Probability[p.Length];
        Array.Fill(largest, Probability.Zero);
        for (uint subset = 1; subset < 1u << p.Length; subset++)
        {
            Probability[] members = [.. Enumerable.Range(0, p.Length).Where(i => (subset >> i & 1) == 1).Select(i => p[i]).Order()];
            var simes = Probability.One;
            for (int j = 0; j < members.Length; j++)
                simes = Probability.Min(simes, members[j].Times((double)members.Length / (j + 1)));
            for (uint left = subset; left != 0; left &= left - 1)
            {
                int i = BitOperations.TrailingZeroCount(left);
                largest[i] = Probability.Max(largest[i], simes);
            }
        }

        return largest;
    }
}
