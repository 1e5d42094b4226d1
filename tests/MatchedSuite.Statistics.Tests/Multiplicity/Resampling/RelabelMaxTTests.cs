using CsCheck;
using MatchedSuite.Statistics.Multiplicity.Resampling;

namespace MatchedSuite.Statistics.Tests.Multiplicity.Resampling;

public class RelabelMaxTTests
{
    private static readonly Gen<ResamplingOptions> Options =
        Gen.Select(Gen.Long, Gen.Int[1, 300], Gen.Enum<Sides>(), Gen.Int[1, 3], Gen.Int[0, 1])
            .Select((seed, resamples, sides, threads, small) => new ResamplingOptions
            {
                Seed = seed,
                Resamples = resamples,
                Sides = sides,
                Threads = threads,
                PanelMemory = small == 1 ? 1 : 1 << 20,
            });

    // Any shapes, blocks that lack a label among them, labels in any order.
    private static readonly Gen<RelabelBlocks> Blocks = Gen.Select(Gen.Int[1, 9].Array[1, 20], Gen.Bool.Array[180, 180]).Select(Of);

    [Fact]
    public void Counts_equal_those_of_the_plain_twin_for_every_shape_side_and_pattern_of_missing_values() =>
        Gen.Select(Blocks, Gen.Int[1, 40], Gen.Int[0, 3], Gen.Long, Options).Sample((blocks, endpoints, kind, seed, options) =>
        {
            double[] values = InventedDifferences.Of(endpoints, blocks.Members, kind, seed);
            var fast = RelabelMaxT.Run(new DifferenceTable(values, blocks.Members), blocks, options);
            var (stepDown, singleStep) = PlainRelabelMaxT.Counts(values, blocks, options.Sides, PlainRelabelMaxT.Labellings(blocks, options));
            Assert.Equal(stepDown, fast.StepDownExceedances);
            Assert.Equal(singleStep, fast.SingleStepExceedances);
        }, iter: 200);

    [Fact]
    public void Two_large_arms_have_the_counts_of_the_plain_twin()
    {
        RelabelBlocks arms = Of([130], [.. Enumerable.Range(0, 130).Select(i => i * 7 % 13 < 6)]);
        double[] values = InventedDifferences.Of(100, 130, 3, 12);
        var options = new ResamplingOptions { Seed = 9, Resamples = 400 };
        var fast = RelabelMaxT.Run(new DifferenceTable(values, 130), arms, options);
        var (stepDown, singleStep) = PlainRelabelMaxT.Counts(values, arms, Sides.Two, PlainRelabelMaxT.Labellings(arms, options));
        Assert.Equal(stepDown, fast.StepDownExceedances);
        Assert.Equal(singleStep, fast.SingleStepExceedances);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    public void Small_studies_have_the_exact_p_of_every_labelling_written_out(int kind)
    {
        foreach (RelabelBlocks blocks in new[]
        {
            Of([3, 3, 4, 2], [true, false, false, false, true, false, true, true, false, false, true, false]),
            Of([11], [true, false, true, true, false, false, false, true, false, true, false]),
            Of([2, 5, 1, 4], [false, true, true, false, true, false, true, true, false, false, false, true]),
        })
        {
            double[] values = InventedDifferences.Of(12, blocks.Members, kind, 31);
            List<bool[]> all = PlainRelabelMaxT.AllLabellings(blocks);
            foreach (Sides sides in Enum.GetValues<Sides>())
            {
                var fast = RelabelMaxT.Run(new DifferenceTable(values, blocks.Members), blocks, new ResamplingOptions { Sides = sides });
                var (stepDown, singleStep) = PlainRelabelMaxT.Counts(values, blocks, sides, all);
                Assert.True(fast.Exhaustive);
                Assert.Equal(all.Count - 1, fast.Flips);
                Assert.Equal(stepDown.Select(b => Math.Max(-1, b - 1)), fast.StepDownExceedances);
                for (int j = 0; j < singleStep.Length; j++)
                    Assert.Equal(singleStep[j] < 0 ? double.NaN : singleStep[j] / (double)all.Count, fast.SingleStep[j].Value, 1e-15);
            }
        }
    }

    [Fact]
    public void Sets_of_one_and_one_have_the_p_of_sign_flips_of_their_differences() =>
        Gen.Select(Gen.Int[2, 9], Gen.Int[1, 30], Gen.Int[0, 1], Gen.Long, Gen.Enum<Sides>(), Gen.Bool.Array[9]).Sample((sets, endpoints, whole, seed, sides, first) =>
        {
            double[] values = InventedDifferences.Of(endpoints, 2 * sets, 2 * whole, seed);
            RelabelBlocks blocks = Of([.. Enumerable.Repeat(2, sets)], [.. first.SelectMany(index => new[] { index, !index })]);
            double[] differences = new double[endpoints * sets];
            for (int at = 0; at < differences.Length; at++)
                differences[at] = first[at % sets] ? values[2 * at] - values[2 * at + 1] : values[2 * at + 1] - values[2 * at];
            foreach (FlipStatistic statistic in Enum.GetValues<FlipStatistic>())
            {
                var options = new ResamplingOptions { Sides = sides, Statistic = statistic };
                var flipped = MaxT.Run(new DifferenceTable(differences, sets), options);
                var relabelled = RelabelMaxT.Run(new DifferenceTable(values, 2 * sets), blocks, options);
                Assert.True(relabelled.Exhaustive);
                Assert.Equal(flipped.StepDown, relabelled.StepDown);
                Assert.Equal(flipped.SingleStep, relabelled.SingleStep);
            }
        }, iter: 100);

    [Fact]
    public void Two_arms_and_one_endpoint_have_the_p_of_all_differences_of_means()
    {
        double[] values = [2.5, 0.3, 4.1, 1.9, 3.3, -0.7, 0.4, 1.1, -1.2];
        RelabelBlocks arms = Of([9], [true, false, true, false, true, false, false, true, false]);
        double Difference(ReadOnlySpan<bool> labels)
        {
            bool[] index = labels.ToArray();
            return values.Where((_, i) => index[i]).Average() - values.Where((_, i) => !index[i]).Average();
        }

        double observed = Math.Abs(Difference(arms.IsIndex)) - 1e-12;
        List<bool[]> all = PlainRelabelMaxT.AllLabellings(arms);
        double p = all.Count(labels => Math.Abs(Difference(labels)) >= observed) / (double)all.Count;
        Assert.Equal(126, all.Count);
        Assert.Equal(p, RelabelMaxT.Run(new DifferenceTable(values, 9), arms, new ResamplingOptions()).StepDown[0].Value, 1e-15);
    }

    [Fact]
    public void Threads_and_panels_change_nothing()
    {
        RelabelBlocks blocks = Of([.. Enumerable.Repeat(4, 20)], [.. Enumerable.Range(0, 80).Select(i => i % 4 == 0)]);
        var values = new DifferenceTable(InventedDifferences.Of(40, 80, 3, 3), 80);
        var plain = RelabelMaxT.Run(values, blocks, new ResamplingOptions { Seed = 1, Resamples = 2701, Threads = 1 });
        foreach (var (threads, memory) in new[] { (2, 1L << 20), (3, 1L), (7, 4_000L) })
        {
            var other = RelabelMaxT.Run(values, blocks, new ResamplingOptions { Seed = 1, Resamples = 2701, Threads = threads, PanelMemory = memory });
            Assert.Equal(plain.StepDownExceedances, other.StepDownExceedances);
            Assert.Equal(plain.SingleStepExceedances, other.SingleStepExceedances);
            Assert.Equal(plain.CriticalValue, other.CriticalValue);
        }
    }

    [Fact]
    public void Counts_are_the_same_on_every_machine()
    {
        // Recorded once; labels, whole-number sums and their order of magnitude may depend on no processor.
        double[] whole = [.. Enumerable.Range(0, 40 * 60).Select(i => (double)(i * 7919 % 23 + (i % 3 == 0 ? i / 60 % 5 : 0)))];
        RelabelBlocks blocks = Of([.. Enumerable.Repeat(3, 20)], [.. Enumerable.Range(0, 60).Select(i => i % 3 == 0)]);
        var result = RelabelMaxT.Run(new DifferenceTable(whole, 60), blocks, new ResamplingOptions { Seed = 2026, Resamples = 4999 });
        Assert.Equal(RecordedCounts, string.Join(' ', result.StepDownExceedances.Order().Distinct().Take(8)));
    }

    [Fact]
    public void Order_of_endpoints_units_and_the_level_of_a_block_change_nothing()
    {
        RelabelBlocks blocks = Of([3, 4, 5, 6, 2, 3, 4], [.. Enumerable.Range(0, 27).Select(i => i * 5 % 7 < 3)]);
        double[] values = InventedDifferences.Of(30, 27, 1, 77);
        double[] backwards = [.. Enumerable.Range(0, 30).Reverse().SelectMany(j => values.Skip(j * 27).Take(27))];
        double[] moved = [.. values.Select((x, at) => (x + (3 * BlockOf(blocks, at % 27))) * Math.Pow(1000, at / 27 % 5))];
        var options = new ResamplingOptions { Seed = 6, Resamples = 999, Sides = Sides.Greater };
        IReadOnlyList<int> counts = Run(values, blocks, options);
        Assert.Equal(counts, Run(backwards, blocks, options).Reverse());
        Assert.Equal(counts, Run(moved, blocks, options));
    }

    [Fact]
    public void Labels_that_change_places_mirror_the_sides()
    {
        RelabelBlocks blocks = Of([3, 5, 7], [true, false, false, true, true, false, true, true, false, false, true, false, false, true, false]);
        RelabelBlocks swapped = new(blocks.Starts, [.. blocks.IsIndex.ToArray().Select(label => !label)]);
        double[] values = InventedDifferences.Of(20, 15, 1, 5);
        double[] negative = [.. values.Select(x => -x)];
        var options = new ResamplingOptions { Seed = 6, Resamples = 999 };
        IReadOnlyList<int> greater = Run(values, blocks, options with { Sides = Sides.Greater });
        Assert.Equal(greater, Run(values, swapped, options with { Sides = Sides.Less }));
        Assert.Equal(greater, Run(negative, blocks, options with { Sides = Sides.Less }));
        Assert.Equal(Run(values, blocks, options), Run(negative, swapped, options));
    }

    [Fact]
    public void Blocks_are_balanced_where_each_that_has_both_labels_has_as_many_of_each()
    {
        Assert.True(Of([2, 4, 1, 3], [true, false, false, true, true, false, true, false, false, false]).IsBalanced);
        Assert.False(Of([2, 3], [true, false, false, true, false]).IsBalanced);
    }

    [Fact]
    public void Endpoints_with_nothing_to_relabel_are_missing_and_harmless()
    {
        RelabelBlocks blocks = Of([3, 3, 3, 3, 3, 2], [.. Enumerable.Range(0, 17).Select(i => i % 3 == 0 || i > 14)]);
        double[] values = InventedDifferences.Of(5, 17, 0, 2);
        double[] flat = [.. Enumerable.Range(0, 17).Select(i => 0.1 * (1 + i / 3))];
        double[] oneLabel = [.. flat[..16], 7.5];
        double[] lone = [.. Enumerable.Repeat(double.NaN, 16), 3];
        var options = new ResamplingOptions { Seed = 6, Resamples = 999 };
        Assert.Equal([-1, .. Run(values, blocks, options), -1, -1], Run([.. flat, .. values, .. oneLabel, .. lone], blocks, options));
    }

    [Fact]
    public void Step_down_lies_between_the_marginal_share_and_the_single_step()
    {
        RelabelBlocks blocks = Of([.. Enumerable.Repeat(4, 10)], [.. Enumerable.Range(0, 40).Select(i => i % 4 == 0)]);
        double[] values = InventedDifferences.Of(60, 40, 1, 8);
        var options = new ResamplingOptions { Seed = 4, Resamples = 1500 };
        var all = RelabelMaxT.Run(new DifferenceTable(values, 40), blocks, options);
        for (int j = 0; j < 60; j++)
        {
            var alone = RelabelMaxT.Run(new DifferenceTable(values.AsMemory(j * 40, 40), 40), blocks, options);
            Assert.InRange(all.StepDownExceedances[j], alone.SingleStepExceedances[0], all.SingleStepExceedances[j]);
        }
    }

    [Fact]
    public void Another_number_of_members_than_of_values_is_refused() =>
        Assert.Throws<ArgumentException>(() => RelabelMaxT.Run(new DifferenceTable(new double[10], 5), Of([4], [true, false, true, false]), new ResamplingOptions()));

    internal static RelabelBlocks Of(int[] sizes, bool[] labels)
    {
        var starts = new int[sizes.Length + 1];
        for (int block = 0; block < sizes.Length; block++)
            starts[block + 1] = starts[block] + sizes[block];
        return new RelabelBlocks(starts, labels.AsSpan(0, starts[^1]));
    }

    private const string RecordedCounts = "843 1345 1908 1991 2004 2786 3297 4097";

    private static int BlockOf(RelabelBlocks blocks, int member) => blocks.Starts.ToArray().Count(start => start <= member) - 1;

    private static IReadOnlyList<int> Run(double[] values, RelabelBlocks blocks, ResamplingOptions options) =>
        RelabelMaxT.Run(new DifferenceTable(values, blocks.Members), blocks, options).StepDownExceedances;
}
