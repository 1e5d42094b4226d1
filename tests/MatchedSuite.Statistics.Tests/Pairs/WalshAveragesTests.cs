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
                var selection = new PairwiseSumSelection(halves, frame);
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

    [Theory]
    [InlineData("normal")]
    [InlineData("long tails")]
    [InlineData("five values")]
    [InlineData("one outlier")]
    [InlineData("doubling")]
    public void Of_a_hundred_thousand_differences_the_selected_average_has_its_rank(string shape)
    {
        const int n = 100_000;
        var random = new Random(7);
        double[] differences = [.. Enumerable.Range(0, n).Select(i => shape switch
        {
            "normal" => Enumerable.Range(0, 12).Sum(_ => random.NextDouble()) - 6,
            "long tails" => Math.Sinh(200 * (random.NextDouble() - 0.5)),
            "five values" => random.Next(5) - 1.0,
            "one outlier" => i == 0 ? 1e15 : 0.25,
            _ => Math.ScaleB(1, i % 1000),
        })];
        Array.Sort(differences);
        var scratch = new Scratch();
        using var frame = scratch.Open();
        var averages = WalshAverages.Of(differences, frame);
        double median = averages.Median();
        foreach (long rank in new[] { 1, averages.Count / 1000, averages.Count / 2, averages.Count - 77_777, averages.Count })
        {
            double selected = averages.Select(rank, median);
            Assert.True(Below(differences, selected) < rank, $"rank {rank}");
            Assert.True(Below(differences, Math.BitIncrement(selected)) >= rank, $"rank {rank}");
        }
    }

    // How many averages lie below a value, counted row by row.
    private static long Below(double[] sorted, double value)
    {
        long count = 0;
        int end = sorted.Length;
        for (int row = 0; row < sorted.Length; row++)
        {
            while (end > 0 && (0.5 * sorted[row]) + (0.5 * sorted[end - 1]) >= value)
                end--;
            count += Math.Max(0, end - row);
        }

        return count;
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
