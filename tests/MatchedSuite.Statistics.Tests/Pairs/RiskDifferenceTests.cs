using CsCheck;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Statistics.Tests.Pairs;

public class RiskDifferenceTests
{
    private static readonly Gen<PairedTable> Tables =
        Gen.Select(Gen.Int[0, 20], Gen.Int[0, 20], Gen.Int[0, 20], Gen.Int[0, 20]).Where((a, b, c, d) => a + b + c + d > 0)
            .Select((a, b, c, d) => new PairedTable(a, b, c, d));

    private static readonly Gen<TestOptions> AnyOptions =
        Gen.Select(Gen.Enum<Sides>(), Gen.Double[0.55, 0.999], (sides, confidence) => new TestOptions { Sides = sides, Confidence = confidence });

    private static readonly Func<PairedTable, TestOptions, Interval>[] Intervals =
    [
        (t, o) => RiskDifference.SquareAndAdd(t, o), (t, o) => RiskDifference.SquareAndAddUncorrected(t, o), (t, o) => RiskDifference.Score(t, o),
    ];

    [Fact]
    public void Swapping_the_roles_mirrors_every_interval_and_it_encloses_the_difference() =>
        Gen.Select(Tables, AnyOptions).Sample((table, options) =>
        {
            var swapped = new PairedTable(table.Both, table.ReferenceOnly, table.IndexOnly, table.Neither);
            var opposite = options with { Sides = options.Sides switch { Sides.Greater => Sides.Less, Sides.Less => Sides.Greater, _ => Sides.Two } };
            foreach (var interval in Intervals)
            {
                var (plain, mirrored) = (interval(table, options), interval(swapped, opposite));
                Assert.Equal(plain.Low, -mirrored.High, tolerance: 1e-12);
                Assert.Equal(plain.High, -mirrored.Low, tolerance: 1e-12);
                double difference = RiskDifference.Of(table);
                Assert.InRange(difference, plain.Low - 1e-12, plain.High + 1e-12);
            }
        });

    [Fact]
    public void The_score_interval_excludes_zero_exactly_when_McNemar_rejects() =>
        Gen.Select(Tables, AnyOptions).Sample((table, options) =>
        {
            var test = McNemar.Run(table, options);
            if (test.Outcome == Outcome.Tested)
                IntervalLaw.Holds(test.P.Value, RiskDifference.Score(table, options), options.Confidence);
        });

    [Fact]
    public void Where_no_pair_is_discordant_the_score_limits_have_a_closed_form()
    {
        var interval = RiskDifference.Score(new PairedTable(12, 0, 0, 8), TestOptions.Default);
        double square = Math.Pow(StandardNormal.UpperQuantile(0.025), 2);
        Assert.Equal(square / (20 + square), interval.High, tolerance: 1e-14);
        Assert.Equal(-interval.High, interval.Low, tolerance: 1e-15);
    }

    [Fact]
    public void Without_pairs_there_is_no_interval()
    {
        foreach (var interval in Intervals)
            Assert.Equal(Interval.None, interval(default, TestOptions.Default));
    }
}
