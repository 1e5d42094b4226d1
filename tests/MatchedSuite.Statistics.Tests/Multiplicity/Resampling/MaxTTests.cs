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
        }, iter: 300);

    [Fact]
    public void A_screen_of_two_thousand_endpoints_has_the_counts_of_the_plain_twin()
    {
        double[] differences = InventedDifferences.Of(2000, 64, 3, 11);
        var options = new ResamplingOptions { Seed = 5, Resamples = 600 };
        var fast = MaxT.Run(new DifferenceTable(differences, 64), options);
        var (stepDown, singleStep, _) = PlainMaxT.Counts(differences, 64, options);
        Assert.Equal(stepDown, fast.StepDownExceedances);
        Assert.Equal(singleStep, fast.SingleStepExceedances);
    }
}
