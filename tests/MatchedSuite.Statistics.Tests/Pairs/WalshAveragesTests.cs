using CsCheck;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class WalshAveragesTests
{
    private static readonly Gen<double[]> Continuous = Gen.Double[-1e3, 1e3].Array[1, 60];
    private static readonly Gen<double[]> Coarse = Gen.Int[-4, 4].Select(i => i / 4.0).Array[1, 80];
    private static readonly Gen<double[]> LongTailed = Gen.Double[-40, 40].Select(Math.Exp).Array[1, 60];
    private static readonly Gen<double[]> Columns = Gen.OneOf(Continuous, Coarse, LongTailed, Spiked());

    [Fact]
    public void Every_rank_is_that_of_the_full_listing() =>
        Columns.Sample(
            differences =>
            {
                Array.Sort(differences);
                double[] listed = Listed(differences);
                var scratch = new Scratch();
                using var frame = scratch.Open();
                var averages = WalshAverages.Of(differences, frame);
                Assert.Equal(listed.Length, averages.Count);
                double median = averages.Median();
                Assert.Equal((0.5 * listed[(listed.Length - 1) / 2]) + (0.5 * listed[listed.Length / 2]), median);
                for (int rank = 1; rank <= listed.Length; rank++)
                    Assert.Equal(listed[rank - 1], averages.Select(rank, median));
            },
            iter: 300);

    [Fact]
    public void A_wrong_first_guess_changes_the_way_not_the_answer() =>
        Gen.Select(Columns, Gen.Double[-2e3, 2e3], Gen.OneOf(Gen.Const(0.0), Gen.Const(1e-9), Gen.Const(1.0), Gen.Const(1e9), Gen.Const(double.NaN))).Sample(
            (differences, guess, spacing) =>
            {
                Array.Sort(differences);
                double[] listed = Listed(differences);
                double[] halves = [.. differences.Select(d => 0.5 * d)];
                var scratch = new Scratch();
                using var frame = scratch.Open();
                var selection = new WalshSelection(halves, frame);
                foreach (int rank in new[] { 1, 2, (listed.Length / 7) + 1, (listed.Length + 1) / 2, listed.Length })
                {
                    if (rank <= listed.Length)
                        Assert.Equal(listed[rank - 1], selection.Select(rank, guess, spacing));
                }
            },
            iter: 300);

    [Theory]
    [InlineData(2000)]
    [InlineData(2001)]
    public void A_few_thousand_differences_are_selected_as_listed(int n)
    {
        var random = new Random(n);
        double[] differences = [.. Enumerable.Range(0, n).Select(_ => Math.Pow(random.NextDouble() - 0.4, 3))];
        Array.Sort(differences);
        double[] listed = Listed(differences);
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var averages = WalshAverages.Of(differences, frame);
        double median = averages.Median();
        Assert.Equal((0.5 * listed[(listed.Length - 1) / 2]) + (0.5 * listed[listed.Length / 2]), median);
        foreach (int rank in new[] { 1, 7, listed.Length / 3, listed.Length - 1000, listed.Length })
            Assert.Equal(listed[rank - 1], averages.Select(rank, median));
    }

    // One value many times and a few far away: quartiles coincide and the guessed spacing is 0.
    private static Gen<double[]> Spiked() =>
        Gen.Select(Gen.Double[-1e6, 1e6].Array[0, 5], Gen.Int[1, 80]).Select((far, times) => far.Concat(Enumerable.Repeat(1.5, times)).ToArray());

    private static double[] Listed(double[] sorted)
    {
        var averages = new List<double>();
        for (int i = 0; i < sorted.Length; i++)
        {
            for (int j = i; j < sorted.Length; j++)
                averages.Add((0.5 * sorted[i]) + (0.5 * sorted[j]));
        }

        averages.Sort();
        return [.. averages];
    }
}
