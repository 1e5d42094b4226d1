using CsCheck;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Multiplicity.Resampling;

namespace MatchedSuite.Statistics.Tests.Multiplicity.Resampling;

public class CommonRelabelingsTests
{
    [Fact]
    public void Listed_labellings_are_all_but_the_observed_one_each_once() =>
        Gen.Select(Gen.Int[1, 5].Array[1, 3], Gen.Bool.Array[15]).Select(RelabelMaxTTests.Of).Sample(blocks =>
        {
            string[] all = [.. PlainRelabelMaxT.AllLabellings(blocks).Select(Written)];
            string[] listed = [.. PlainRelabelMaxT.Labellings(blocks, new ResamplingOptions { Resamples = Math.Max(1, all.Length - 1) }).Select(Written)];
            Assert.Equal(all.Length - 1, listed.Length);
            Assert.Equal(all.Order(StringComparer.Ordinal), listed.Append(Written(blocks.IsIndex.ToArray())).Order(StringComparer.Ordinal));
        }, iter: 200);

    [Fact]
    public void One_resample_too_few_draws_instead()
    {
        RelabelBlocks blocks = RelabelMaxTTests.Of([4, 3], [true, true, false, false, false, true, false]);
        Assert.True(new CommonRelabelings(blocks, 1, 17).Exhaustive);
        Assert.False(new CommonRelabelings(blocks, 1, 16).Exhaustive);
        Assert.Equal(16, new CommonRelabelings(blocks, 1, 16).Count);
    }

    [Fact]
    public void Drawn_labellings_keep_the_numbers_of_every_block_and_are_equally_likely()
    {
        RelabelBlocks blocks = RelabelMaxTTests.Of([4, 5], [true, false, true, false, true, true, false, true, true]);
        const int Draws = 29;
        var counts = new Dictionary<string, int>();
        for (long seed = 0; seed < 1000; seed++)
        {
            foreach (bool[] labels in PlainRelabelMaxT.Labellings(blocks, new ResamplingOptions { Seed = seed, Resamples = Draws - 1 }))
                counts[Written(labels)] = counts.GetValueOrDefault(Written(labels)) + 1;
        }

        int drawn = counts.Values.Sum();
        Assert.Equal(1000 * (Draws - 1), drawn);
        Assert.Equal(PlainRelabelMaxT.AllLabellings(blocks).Select(Written).Order(StringComparer.Ordinal), counts.Keys.Order(StringComparer.Ordinal));
        double expected = drawn / 30.0;
        double chiSquared = counts.Values.Sum(count => (count - expected) * (count - expected) / expected);

        // Seeds are fixed, so this holds or fails for good; either tail below one in a thousand would be suspect.
        Assert.InRange(ChiSquared.UpperTail(chiSquared, 29).Value, 0.001, 0.999);
    }

    [Fact]
    public void A_block_is_labelled_alike_whatever_blocks_come_after_it()
    {
        bool[] labels = [.. Enumerable.Range(0, 100).Select(i => i % 5 < 2)];
        var options = new ResamplingOptions { Seed = 3, Resamples = 50 };
        List<bool[]> fewer = PlainRelabelMaxT.Labellings(RelabelMaxTTests.Of([5, 5, 5, 5, 5, 5, 5, 5], labels), options);
        List<bool[]> more = PlainRelabelMaxT.Labellings(RelabelMaxTTests.Of([5, 5, 5, 5, 5, 5, 5, 5, 60], labels), options);
        Assert.Equal(fewer.Select(Written), more.Select(labelling => Written(labelling[..40])));
    }

    [Fact]
    public void Variance_is_that_of_the_signed_sum_over_all_labellings()
    {
        RelabelBlocks blocks = RelabelMaxTTests.Of([3, 5, 2, 1], [true, false, false, true, true, false, true, false, false, true, true]);
        var values = new LabelledValues(new DifferenceTable(new[] { 1.5, 2, -3, 0.2, 9, double.NaN, 4, 1, 2, 8, 5 }, 11), blocks);
        var differences = new double[11];
        values.Read(0, 1, differences);
        double[] sums = [.. PlainRelabelMaxT.AllLabellings(blocks).Select(labels =>
            differences.Select((difference, i) => labels[i] == blocks.IsIndex[i] ? difference : -difference).Sum())];
        Assert.Equal(0, sums.Average(), 1e-12);
        Assert.Equal(sums.Average(sum => 4 * sum * sum), new CommonRelabelings(blocks, 1, 1000).Variance(differences, 2), 1e-10);
    }

    private static string Written(bool[] labels) => string.Concat(labels.Select(label => label ? '1' : '0'));
}
