using CsCheck;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Statistics.Randomness;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class SignFlipMeanTests
{
    private static readonly Gen<TestOptions> AnyOptions =
        Gen.Select(Gen.Enum<Sides>(), Gen.Double[0.5, 0.999], (sides, confidence) => new TestOptions { Sides = sides, Confidence = confidence });

    [Fact]
    public void Exact_p_and_limits_equal_the_walk_through_all_flips_ties_and_zeros_included() =>
        Gen.Select(Gen.Int[-20, 20].Array[1, 9], AnyOptions).Sample((tenths, options) =>
        {
            var result = Run([.. tenths.Select(v => v / 10.0)], options);
            if (tenths.All(v => v == 0))
            {
                Assert.Equal(Outcome.NothingDiffers, result.Outcome);
                return;
            }

            int n = tenths.Length, flips = 1 << n, sum = tenths.Sum();
            int[] subsets = [.. Enumerable.Range(0, flips).Select(flip => Subset(tenths, flip))];
            double asHigh = subsets.Count(subset => sum - (2 * subset) >= sum), asLow = subsets.Count(subset => sum - (2 * subset) <= sum);
            double expected = options.Sides switch
            {
                Sides.Greater => asHigh / flips,
                Sides.Less => asLow / flips,
                _ => (double)subsets.Count(subset => Math.Abs(sum - (2 * subset)) >= Math.Abs(sum)) / flips,
            };
            Assert.Equal(expected, result.P.Value, tolerance: 1e-15);
            Assert.Equal(sum / 10.0 / n, result.Estimate, tolerance: 1e-14);
            Assert.Equal(options.Sides == Sides.Less ? double.NegativeInfinity : Limit(tenths, options.TailShare), result.Interval.Low, tolerance: 1e-14);
            Assert.Equal(options.Sides == Sides.Greater ? double.PositiveInfinity : -Limit([.. tenths.Select(v => -v)], options.TailShare),
                result.Interval.High, tolerance: 1e-14);
        });

    [Theory]
    [InlineData(12, 0.0)]
    [InlineData(13, 0.4)]
    [InlineData(14, -7.0)]
    [InlineData(15, 1e3)]
    public void The_limits_of_thousands_of_flips_are_the_means_of_the_right_rank_at_every_confidence(int n, double centre)
    {
        double[] differences = [.. Enumerable.Range(0, n).Select(i => centre + Math.Tan(1 + (2.7 * i)))];
        double[] means = [.. Enumerable.Range(1, (1 << n) - 1).Select(flip =>
            differences.Where((_, set) => (flip >> set & 1) == 1).Sum() / int.PopCount(flip)).Order()];
        double size = differences.Max(Math.Abs);
        for (int percent = 1; percent < 100; percent += 7)
        {
            var options = new TestOptions { Confidence = percent / 100.0 };
            var interval = Run(differences, options).Interval;
            int rank = (int)Math.Ceiling(options.TailShare * (1 << n)) - 1;
            Assert.Equal(means[rank - 1], interval.Low, tolerance: 1e-14 * size);
            Assert.Equal(means[^rank], interval.High, tolerance: 1e-14 * size);
        }
    }

    [Fact]
    public void Random_flips_equal_the_plain_walk_through_their_bits() =>
        Gen.Select(Gen.Int[-50, 60].Array[21, 150], Gen.Long[0, 1000], AnyOptions).Sample((tenths, seed, any) =>
        {
            var options = any with { Seed = seed, Resamples = 99 };
            int sum = tenths.Sum(), n = tenths.Length;
            var (lows, highs) = (new List<double>(), new List<double>());
            double asExtreme = 0;
            for (int b = 0; b < 99; b++)
            {
                int[] chosen = [.. Enumerable.Range(0, n).Where(set =>
                    (CounterRandom.Bits(seed, RandomPurpose.SignFlips, b, set / 64) >> (set % 64) & 1) == 1)];
                int subset = chosen.Sum(set => tenths[set]), flipped = sum - (2 * subset);
                asExtreme += options.Sides switch
                {
                    Sides.Greater => flipped >= sum,
                    Sides.Less => flipped <= sum,
                    _ => Math.Abs(flipped) >= Math.Abs(sum),
                } ? 1 : 0;
                double mean = subset / 10.0 / chosen.Length, rest = (sum - subset) / 10.0 / (n - chosen.Length);
                lows.Add(options.Sides == Sides.Two ? Math.Min(mean, rest) : mean);
                highs.Add(options.Sides == Sides.Two ? Math.Max(mean, rest) : mean);
            }

            var result = Run([.. tenths.Select(v => v / 10.0)], options);
            Assert.Equal((1 + asExtreme) / 100, result.P.Value, tolerance: 1e-15);
            Assert.True(result.Remarks.HasFlag(Remarks.Resampled));
            Assert.Equal(0.01, result.SmallestPossibleP.Value);
            int rank = Enumerable.Range(0, 100).First(rejected => (1.0 + rejected) / 100 >= 1 - options.Confidence);
            double low = rank == 0 ? double.NegativeInfinity : lows.Order().ElementAt(rank - 1);
            double high = rank == 0 ? double.PositiveInfinity : highs.OrderDescending().ElementAt(rank - 1);
            Assert.Equal(options.Sides == Sides.Less ? double.NegativeInfinity : low, result.Interval.Low, tolerance: 1e-13);
            Assert.Equal(options.Sides == Sides.Greater ? double.PositiveInfinity : high, result.Interval.High, tolerance: 1e-13);
        });

    [Theory]
    [InlineData(20, Remarks.Exact)]
    [InlineData(21, Remarks.Resampled)]
    public void Up_to_twenty_pairs_every_flip_is_listed(int n, Remarks remark)
    {
        var result = Run([.. Enumerable.Range(1, n).Select(i => i + 0.5)], TestOptions.Default);
        Assert.Equal(remark, result.Remarks);
        Assert.Equal(result.SmallestPossibleP.Value, result.P.Value);
        Assert.Equal(remark == Remarks.Exact ? Math.ScaleB(1, 1 - n) : 1e-4, result.P.Value, tolerance: 1e-12);
    }

    [Fact]
    public void Many_random_flips_come_near_the_listed_ones()
    {
        double[] differences = [.. Enumerable.Range(0, 20).Select(i => Math.Sin(3.1 * i) + 0.3)];
        var listed = Run(differences, TestOptions.Default);
        // One pair more that hardly matters turns listing into drawing.
        var drawn = Run([.. differences, 1e-6], TestOptions.Default with { Resamples = 99_999 });
        Assert.Equal(listed.P.Value, drawn.P.Value, tolerance: 4 * Math.Sqrt(listed.P.Value / 99_999));
    }

    [Fact]
    public void No_resample_is_refused() =>
        Assert.Throws<ArgumentOutOfRangeException>(() => Run([1, 2], TestOptions.Default with { Resamples = 0 }));

    private static int Subset(int[] values, int flip) => values.Where((_, set) => (flip >> set & 1) == 1).Sum();

    // The mean of a subset of the differences of the rank that the tail share asks for; the empty subset stands below all.
    private static double Limit(int[] tenths, double share)
    {
        int n = tenths.Length;
        double[] means = [.. Enumerable.Range(1, (1 << n) - 1).Select(flip => Subset(tenths, flip) / 10.0 / int.PopCount(flip)).Order()];
        int rank = Enumerable.Range(0, 1 << n).First(rejected => (1.0 + rejected) / (1 << n) >= share);
        return rank == 0 ? double.NegativeInfinity : means[rank - 1];
    }

    private static TestResult Run(double[] differences, TestOptions options)
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return SignFlipMean.Run(PairSample.Of(differences, new double[differences.Length], frame), options, scratch);
    }
}
