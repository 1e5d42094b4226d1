using CsCheck;
using MatchedSuite.Statistics.Multiplicity.Resampling;

namespace MatchedSuite.Statistics.Tests.Multiplicity.Resampling;

public class MinPTests
{
    [Fact]
    public void Counts_equal_those_of_the_definition() =>
        Gen.Select(Gen.Int[1, 12], Gen.Int[3, 40], Gen.Int[0, 3], Gen.Long, Gen.Enum<Sides>(), Gen.Int[1, 120]).Sample((endpoints, sets, kind, seed, sides, resamples) =>
        {
            double[] differences = InventedDifferences.Of(endpoints, sets, kind, seed);
            var options = new ResamplingOptions { Seed = seed, Resamples = resamples, Sides = sides, Threads = 2, PanelMemory = seed % 2 == 0 ? 1 : 1 << 20 };
            var fast = MinP.Run(new DifferenceTable(differences, sets), options);
            var (stepDown, singleStep) = Definition(differences, sets, options);
            Assert.Equal(stepDown, fast.StepDownExceedances);
            Assert.Equal(singleStep, fast.SingleStepExceedances);
        }, iter: 300);

    [Fact]
    public void Monotone_changes_of_single_endpoints_scale_change_nothing()
    {
        double[] differences = InventedDifferences.Of(30, 25, 1, 9);
        var options = new ResamplingOptions { Seed = 3, Resamples = 500 };
        var t = MinP.Run(new DifferenceTable(differences, 25), options);
        var score = MinP.Run(new DifferenceTable(differences, 25), options with { Statistic = FlipStatistic.Score });
        Assert.Equal(t.StepDownExceedances, score.StepDownExceedances);
    }

    private static (int[] StepDown, int[] SingleStep) Definition(double[] differences, int sets, ResamplingOptions options)
    {
        int endpoints = differences.Length / sets;
        var flips = new CommonFlips(sets, options.Seed, options.Resamples);
        var sums = new double[endpoints][];
        var magnitudes = new double[endpoints];
        for (int j = 0; j < endpoints; j++)
            (sums[j], magnitudes[j]) = Sums(differences.AsSpan(j * sets, sets), flips, options.Sides);
        int Reached(int j, int flip) =>
            sums[j].Count(sum => sum >= sums[j][flip] - 1e-9 * Math.Abs(sums[j][flip]) - 1e-12 * magnitudes[j]);
        int[] tested = [.. Enumerable.Range(0, endpoints).Where(j => magnitudes[j] > 0 && differences.AsSpan(j * sets, sets).ToArray().Count(double.IsFinite) > 1)];
        int[] order = [.. tested.OrderBy(j => Reached(j, flips.Count))];
        var stepDown = Enumerable.Repeat(-1, endpoints).ToArray();
        var singleStep = Enumerable.Repeat(-1, endpoints).ToArray();
        var counts = tested.ToDictionary(j => j, j => Enumerable.Range(0, flips.Count).Select(flip => Reached(j, flip)).ToArray());
        int largest = 0;
        for (int place = 0; place < order.Length; place++)
        {
            int observed = Reached(order[place], flips.Count);
            int own = Enumerable.Range(0, flips.Count).Count(flip => order[place..].Min(j => counts[j][flip]) <= observed);
            stepDown[order[place]] = largest = Math.Max(largest, own);
            singleStep[order[place]] = Enumerable.Range(0, flips.Count).Count(flip => order.Min(j => counts[j][flip]) <= observed);
        }

        return (stepDown, singleStep);
    }

    // The last sum is that of the data as they are.
    private static (double[] Sums, double Magnitude) Sums(ReadOnlySpan<double> differences, CommonFlips flips, Sides sides)
    {
        var sums = new double[flips.Count + 1];
        var flip = new ulong[flips.Words];
        double magnitude = 0;
        for (int k = 0; k <= flips.Count; k++)
        {
            Array.Clear(flip);
            if (k < flips.Count)
                flips.Fill(k, flip);
            magnitude = 0;
            for (int i = 0; i < differences.Length; i++)
            {
                double d = double.IsNaN(differences[i]) ? 0 : differences[i];
                sums[k] += (flip[i / 64] >> (i % 64) & 1) == 1 ? -d : d;
                magnitude += Math.Abs(d);
            }

            sums[k] = sides switch { Sides.Two => Math.Abs(sums[k]), Sides.Less => -sums[k], _ => sums[k] };
        }

        return (sums, magnitude);
    }
}
