using System.Numerics;
using CsCheck;
using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Statistics.Tests.Multiplicity;

public class ClosedTestingTests
{
    [Fact]
    public void Bounds_of_every_list_equal_closed_testing_over_all_subsets_up_to_twelve_hypotheses() =>
        Gen.Select(SignalVector, Levels).Sample((p, level) =>
        {
            var bounds = ClosedTesting.WithSimes(p, level);
            int[] exact = BoundOfEverySubset(p, level);
            for (int subset = 0; subset < exact.Length; subset++)
            {
                int[] list = [.. Enumerable.Range(0, p.Length).Where(i => (subset >> i & 1) == 1)];
                Assert.Equal(exact[subset], bounds.TrueDiscoveriesAtLeast(list));
            }

            Assert.Equal(exact[^1], bounds.Tested - bounds.TrueNullsAtMost);
        }, iter: 60);

    [Fact]
    public void Bounds_of_the_top_lists_equal_those_of_the_same_lists_asked_one_by_one() =>
        Gen.Select(PValueVectors.UpTo(60), Levels).Sample((p, level) =>
        {
            var bounds = ClosedTesting.WithSimes(p, level);
            int[] top = bounds.TrueDiscoveriesInTop();
            int[] order = [.. Enumerable.Range(0, p.Length).Where(i => !p[i].IsMissing).OrderBy(i => p[i])];
            Assert.Equal(order.Length, top.Length);
            for (int k = 1; k <= order.Length; k++)
                Assert.Equal(bounds.TrueDiscoveriesAtLeast(order.AsSpan(0, k)), top[k - 1]);
        });

    [Fact]
    public void A_single_hypothesis_is_a_discovery_exactly_when_Hommel_rejects_it() =>
        Gen.Select(PValueVectors.CompleteUpTo(40), PValueVectors.Levels(0.001, 0.6)).Sample((p, level) =>
        {
            var bounds = ClosedTesting.WithSimes(p, level);
            var adjusted = PValueVectors.Adjusted(Hommel.Adjust, p);
            for (int i = 0; i < p.Length; i++)
                Assert.Equal(adjusted[i].IsAtMost(level) ? 1 : 0, bounds.TrueDiscoveriesAtLeast([i]));
        });

    [Fact]
    public void Missing_p_values_add_nothing_to_a_list()
    {
        var bounds = ClosedTesting.WithSimes([Probability.Of(1e-9), Probability.Missing, Probability.Of(1e-8), Probability.Of(0.7)], 0.05);
        Assert.Equal(2, bounds.TrueDiscoveriesAtLeast([0, 1, 2]));
        Assert.Equal(3, bounds.Tested);
        Assert.Equal(1, bounds.TrueNullsAtMost);
    }

    [Fact]
    public void A_position_listed_twice_or_out_of_range_is_refused()
    {
        var bounds = ClosedTesting.WithSimes([Probability.Of(0.01), Probability.Of(0.5)], 0.05);
        Assert.Throws<ArgumentException>(() => bounds.TrueDiscoveriesAtLeast([0, 0]));
        Assert.Throws<ArgumentException>(() => bounds.TrueDiscoveriesAtLeast([2]));
        Assert.Throws<ArgumentOutOfRangeException>(() => ClosedTesting.WithSimes([], 1));
    }

    private static Gen<double> Levels => Gen.Int[0, 3].Select(k => new[] { 0.01, 0.05, 0.2, 0.5 }[k]);

    private static Gen<Probability[]> SignalVector =>
        Gen.Frequency(
            (3, Gen.Double[0, 1].Select(u => Probability.Of(u * u * u * 0.2))),
            (2, Gen.Double[0, 1].Select(Probability.Of)),
            (1, Gen.Int[0, 12].Select(k => Probability.Of(k / 100.0)))).Array[1, 12];

    // The bound of a list: its size less the largest subset that closed testing does not reject.
    private static int[] BoundOfEverySubset(Probability[] p, double level)
    {
        int subsets = 1 << p.Length;
        var rejectedLocally = new bool[subsets];
        for (int subset = 1; subset < subsets; subset++)
        {
            double[] members = [.. Enumerable.Range(0, p.Length).Where(i => (subset >> i & 1) == 1).Select(i => p[i].Value).Order()];
            rejectedLocally[subset] = Enumerable.Range(1, members.Length).Any(j => members.Length * members[j - 1] <= j * level);
        }

        // Rejected by closed testing: itself and everything that holds it.
        var rejected = (bool[])rejectedLocally.Clone();
        for (int subset = subsets - 1; subset > 0; subset--)
        {
            for (int i = 0; i < p.Length; i++)
                rejected[subset] &= (subset >> i & 1) == 1 || rejected[subset | 1 << i];
        }

        var largestAccepted = new int[subsets];
        for (int subset = 1; subset < subsets; subset++)
        {
            if (!rejected[subset])
            {
                largestAccepted[subset] = BitOperations.PopCount((uint)subset);
                continue;
            }

            for (int i = 0; i < p.Length; i++)
                largestAccepted[subset] = Math.Max(largestAccepted[subset], (subset >> i & 1) == 1 ? largestAccepted[subset & ~(1 << i)] : 0);
        }

        return [.. Enumerable.Range(0, subsets).Select(subset => BitOperations.PopCount((uint)subset) - largestAccepted[subset])];
    }
}
