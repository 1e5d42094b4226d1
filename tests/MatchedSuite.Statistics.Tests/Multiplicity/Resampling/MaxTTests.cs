using CsCheck;
using MatchedSuite.Statistics.Multiplicity.Resampling;

namespace MatchedSuite.Statistics.Tests.Multiplicity.Resampling;

public class MaxTTests
{
    private static readonly Gen<ResamplingOptions> Options =
        Gen.Select(Gen.Long, Gen.Int[1, 400], Gen.Enum<Sides>(), Gen.Enum<FlipStatistic>(), Gen.Int[1, 3], Gen.Int[0, 1], Gen.Double[0.01, 0.3])
            .Select((seed, resamples, sides, statistic, threads, small, level) => new ResamplingOptions
            {
                Seed = seed,
                Resamples = resamples,
                Sides = sides,
                Statistic = statistic,
                Threads = threads,
                PanelMemory = small == 1 ? 1 : 1 << 20,
                Level = level,
            });

    // Endpoints share a part per set; some are whole numbers with many ties, some differ in scale by many powers of ten.
    private static readonly Gen<(double[] Differences, int Sets)> Studies =
        Gen.Select(Gen.Int[1, 70], Gen.Int[2, 90], Gen.Int[0, 3], Gen.Long).Select((endpoints, sets, kind, seed) =>
            (InventedDifferences.Of(endpoints, sets, kind, seed), sets));

    [Fact]
    public void Counts_equal_those_of_the_plain_twin_for_every_statistic_side_and_pattern_of_missing_sets() =>
        Gen.Select(Studies, Options).Sample((study, options) =>
        {
            var fast = MaxT.Run(new DifferenceTable(study.Differences, study.Sets), options);
            var (stepDown, singleStep, critical) = PlainMaxT.Counts(study.Differences, study.Sets, options);
            Assert.Equal(stepDown, fast.StepDownExceedances);
            Assert.Equal(singleStep, fast.SingleStepExceedances);
            if (critical < 1e6)
                Assert.Equal(critical, fast.CriticalValue, 1e-9 * Math.Max(1, Math.Abs(critical)));
        }, iter: 200);

    [Fact]
    public void A_screen_of_a_thousand_endpoints_has_the_counts_of_the_plain_twin()
    {
        double[] differences = InventedDifferences.Of(1000, 64, 3, 11);
        var options = new ResamplingOptions { Seed = 5, Resamples = 300 };
        var fast = MaxT.Run(new DifferenceTable(differences, 64), options);
        var (stepDown, singleStep, _) = PlainMaxT.Counts(differences, 64, options);
        Assert.Equal(stepDown, fast.StepDownExceedances);
        Assert.Equal(singleStep, fast.SingleStepExceedances);
    }

    [Fact]
    public void Threads_and_panels_change_nothing()
    {
        double[] differences = InventedDifferences.Of(40, 30, 3, 3);
        var plain = MaxT.Run(new DifferenceTable(differences, 30), new ResamplingOptions { Seed = 1, Resamples = 2701, Threads = 1 });
        foreach (var (threads, memory) in new[] { (2, 1L << 20), (3, 1L), (7, 4_000L) })
        {
            var other = MaxT.Run(new DifferenceTable(differences, 30), new ResamplingOptions { Seed = 1, Resamples = 2701, Threads = threads, PanelMemory = memory });
            Assert.Equal(plain.StepDownExceedances, other.StepDownExceedances);
            Assert.Equal(plain.SingleStepExceedances, other.SingleStepExceedances);
            Assert.Equal(plain.CriticalValue, other.CriticalValue);
        }
    }

    [Fact]
    public void Counts_are_the_same_on_every_machine()
    {
        // Recorded once; flips, whole-number sums and their order of magnitude may depend on no processor.
        double[] whole = [.. Enumerable.Range(0, 40 * 33).Select(i => (double)(i * 7919 % 23 - 9 - i % 3))];
        var result = MaxT.Run(new DifferenceTable(whole, 33), new ResamplingOptions { Seed = 2026, Resamples = 4999 });
        Assert.Equal(RecordedCounts, string.Join(' ', result.StepDownExceedances.Order().Take(8)));
    }

    [Fact]
    public void Step_down_lies_between_the_marginal_share_and_the_single_step()
    {
        double[] differences = InventedDifferences.Of(60, 40, 1, 8);
        var options = new ResamplingOptions { Seed = 4, Resamples = 1500 };
        var all = MaxT.Run(new DifferenceTable(differences, 40), options);
        for (int j = 0; j < 60; j++)
        {
            var alone = MaxT.Run(new DifferenceTable(differences.AsMemory(j * 40, 40), 40), options);
            Assert.InRange(all.StepDownExceedances[j], alone.SingleStepExceedances[0], all.SingleStepExceedances[j]);
        }
    }

    [Fact]
    public void Units_and_swapped_roles_change_nothing_and_sides_mirror_each_other()
    {
        double[] differences = InventedDifferences.Of(40, 50, 1, 21);
        double[] mirrored = [.. differences.Select((d, i) => -d * Math.Pow(1000, i / 50 % 5))];
        var options = new ResamplingOptions { Seed = 6, Resamples = 999 };
        Assert.Equal(Run(differences, 50, options), Run(mirrored, 50, options));
        Assert.Equal(Run(differences, 50, options with { Sides = Sides.Greater }), Run(mirrored, 50, options with { Sides = Sides.Less }));
    }

    [Fact]
    public void Endpoints_with_nothing_to_flip_are_missing_and_harmless()
    {
        double[] differences = InventedDifferences.Of(5, 20, 0, 2);
        double[] padded = [.. new double[20], .. differences, .. Enumerable.Repeat(double.NaN, 20), .. Enumerable.Repeat(double.NaN, 19), 3];
        var options = new ResamplingOptions { Seed = 6, Resamples = 999 };
        var result = MaxT.Run(new DifferenceTable(padded, 20), options);
        Assert.Equal([-1, .. Run(differences, 20, options), -1, -1], result.StepDownExceedances);
        Assert.True(result.StepDown[0].IsMissing && result.SingleStep[6].IsMissing && result.StepDown[7].IsMissing);
    }

    [Fact]
    public void A_store_without_any_tested_endpoint_gives_only_missing_values()
    {
        var result = MaxT.Run(new DifferenceTable(new double[30], 10), new ResamplingOptions());
        Assert.All(result.StepDown, p => Assert.True(p.IsMissing));
        Assert.Equal(double.PositiveInfinity, result.CriticalValue);
        Assert.Empty(MaxT.Run(new DifferenceTable(Array.Empty<double>(), 10), new ResamplingOptions()).StepDown);
    }

    [Fact]
    public void A_run_that_is_cancelled_stops()
    {
        using var stopped = new CancellationTokenSource();
        stopped.Cancel();
        Assert.ThrowsAny<OperationCanceledException>(() => MaxT.Run(new DifferenceTable(InventedDifferences.Of(20, 30, 0, 1), 30), new ResamplingOptions(), stopped.Token));
    }

    private const string RecordedCounts = "4913 4927 4927 4927 4927 4946 4946 4946";

    private static IReadOnlyList<int> Run(double[] differences, int sets, ResamplingOptions options) =>
        MaxT.Run(new DifferenceTable(differences, sets), options).StepDownExceedances;
}
