using CsCheck;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Statistics.Twins;

namespace MatchedSuite.Statistics.Tests.Twins;

public class IntraclassCorrelationTests
{
    private static readonly Gen<(double Index, double Reference)[]> Pairs =
        Gen.Select(Gen.Int[-99, 99], Gen.Int[-99, 99], (a, b) => (a / 10.0, b / 10.0)).Array[2, 30];

    [Fact]
    public void Twins_are_exchangeable_and_neither_unit_nor_offset_matters() =>
        Gen.Select(Pairs, Gen.Bool.Array[30]).Sample((pairs, turned) =>
        {
            var plain = Of(pairs);
            var other = Of([.. pairs.Select((p, i) => turned[i] ? (p.Reference, p.Index) : p)]);
            var moved = Of([.. pairs.Select(p => ((p.Index * 25) + 1000, (p.Reference * 25) + 1000))]);
            Assert.Equal(plain.Outcome, other.Outcome);
            Assert.Equal(plain.Estimate, other.Estimate, tolerance: 1e-10);
            Assert.Equal(plain.Estimate, moved.Estimate, tolerance: 1e-9);
            Assert.Equal(plain.P.Value, moved.P.Value, tolerance: 1e-9);
        });

    [Fact]
    public void For_pairs_it_is_sums_and_differences() =>
        Pairs.Where(pairs => pairs.Any(p => p.Index != p.Reference)).Sample(pairs =>
        {
            var result = Of(pairs);
            double mean = pairs.Average(p => (p.Index + p.Reference) / 2);
            double between = 2 * pairs.Sum(p => Math.Pow(((p.Index + p.Reference) / 2) - mean, 2)) / (pairs.Length - 1);
            double within = pairs.Sum(p => Math.Pow(p.Index - p.Reference, 2)) / (2 * pairs.Length);
            Assert.Equal(between, result.BetweenMeanSquare, tolerance: 1e-9);
            Assert.Equal(within, result.WithinMeanSquare, tolerance: 1e-9);
            Assert.Equal((between - within) / (between + within), result.Estimate, tolerance: 1e-9);
            Assert.InRange(result.Estimate, -1, 1);
            Assert.InRange(result.Estimate, result.Interval.Low, result.Interval.High);
        });

    [Fact]
    public void The_lower_limit_is_above_zero_exactly_when_p_is_below_the_tail_share() =>
        Gen.Select(Pairs, Gen.Double[0.5, 0.99]).Sample((pairs, confidence) =>
        {
            var options = new TestOptions { Confidence = confidence };
            var result = Of(pairs, options);
            if (result.Outcome == Outcome.Tested && Math.Abs(result.P.Value - options.TailShare) > 1e-9)
                Assert.Equal(result.P.Value < options.TailShare, result.Interval.Low > 0);
        });

    [Fact]
    public void Twins_that_are_the_same_correlate_fully_and_values_that_are_all_the_same_not_at_all()
    {
        Assert.Equal(1, Of([(1, 1), (2, 2), (7, 7)]).Estimate);
        Assert.Equal(1, Of([(1, 1), (2, 2), (7, 7)]).Interval.Low);
        Assert.Equal(Outcome.NoVariation, Of([(0.1, 0.1), (0.1, 0.1)]).Outcome);
        Assert.Equal(Outcome.TooFewSets, Of([(1, 2)]).Outcome);
        Assert.Equal(-1, Of([(1, 2), (2, 1)]).Estimate);
    }

    [Fact]
    public void Falconer_reads_both_correlations()
    {
        Assert.Equal(0.6, Falconer.Heritability(0.8, 0.5), tolerance: 1e-15);
        Assert.Equal(0.2, Falconer.SharedEnvironment(0.8, 0.5), tolerance: 1e-15);
    }

    private static IntraclassResult Of((double Index, double Reference)[] pairs, TestOptions? options = null)
    {
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return IntraclassCorrelation.Of(
            PairSample.Of([.. pairs.Select(p => p.Index)], [.. pairs.Select(p => p.Reference)], frame), options ?? TestOptions.Default, scratch);
    }
}
