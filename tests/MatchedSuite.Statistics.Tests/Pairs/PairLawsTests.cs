using CsCheck;

namespace MatchedSuite.Statistics.Tests.Pairs;

/// <summary>What must hold for every pair method, whatever the values.</summary>
public class PairLawsTests
{
    private static readonly Gen<TestOptions> AnyOptions =
        Gen.Select(Gen.Enum<Sides>(), Gen.Double[0.5, 0.999], (sides, confidence) => new TestOptions { Sides = sides, Confidence = confidence });

    // Tenths, many ties and zeros; and values with 13 digits.
    private static readonly Gen<(double Index, double Reference)> Coarse =
        Gen.Select(Gen.Int[-30, 30], Gen.Int[-30, 30], (a, b) => (a / 10.0, b / 10.0));

    private static readonly Gen<(double Index, double Reference)> Fine =
        Gen.Select(Gen.Double[-5, 10], Gen.Double[-5, 5], (a, b) => (Math.Round(a, 12), Math.Round(b, 12)));
    private static readonly Gen<(double Index, double Reference)[]> Pairs = Gen.OneOf(Coarse.Array[1, 70], Fine.Array[1, 70]);
    // Sizes that differ by at least 0.1, none zero.
    private static readonly Gen<(double Index, double Reference)[]> Untied =
        Gen.Select(Gen.Bool, Gen.Double[0, 0.9]).Array[2, 70].Select(parts =>
            parts.Select((part, i) => (part.Item1 ? i + 1 + part.Item2 : -i - 1 - part.Item2, 0.0)).ToArray());

    private static readonly Gen<(double Index, double Reference)[]> BinaryPairs =
        Gen.Select(Gen.Int[0, 1], Gen.Int[0, 1], (a, b) => ((double)a, (double)b)).Array[1, 60];

    public static TheoryData<string> Measured => [.. PairMethods.Measured.Keys];

    public static TheoryData<string> Binary => [.. PairMethods.Binary.Keys];

    public static TheoryData<string> Categories => [.. PairMethods.Categories.Keys];

    public static TheoryData<string> Counts => [.. PairMethods.Counts.Keys];

    private static readonly Gen<(double Index, double Reference)[]> CategoryPairs =
        Gen.Select(Gen.Int[0, 4], Gen.Int[0, 4], (a, b) => ((double)a, (double)b)).Array[1, 60];

    private static readonly Gen<(double Index, double Reference)[]> CountPairs =
        Gen.Select(Gen.Int[0, 6], Gen.Int[0, 3], (a, b) => ((double)a, (double)b)).Array[1, 30];

    [Theory]
    [MemberData(nameof(Measured))]
    public void Swapping_the_roles_mirrors_measured_values(string name) => Mirrors(PairMethods.Measured[name], Pairs);

    [Theory]
    [MemberData(nameof(Binary))]
    public void Swapping_the_roles_mirrors_yes_and_no(string name) => Mirrors(PairMethods.Binary[name], BinaryPairs);

    [Theory]
    [MemberData(nameof(Measured))]
    public void A_probability_is_a_probability_and_the_limits_enclose_the_estimate(string name) =>
        IsSound(PairMethods.Measured[name], Pairs);

    [Theory]
    [MemberData(nameof(Binary))]
    public void A_probability_is_a_probability_and_the_limits_enclose_the_log_odds(string name) =>
        IsSound(PairMethods.Binary[name], BinaryPairs);

    [Theory]
    [MemberData(nameof(Counts))]
    public void Swapping_the_roles_mirrors_counts(string name) => Mirrors(PairMethods.Counts[name], CountPairs);

    [Theory]
    [MemberData(nameof(Counts))]
    public void A_probability_is_a_probability_and_the_limits_enclose_the_log_rate_ratio(string name) =>
        IsSound(PairMethods.Counts[name], CountPairs);

    [Theory]
    [MemberData(nameof(Categories))]
    public void Categories_have_no_direction_and_their_codes_no_size(string name) =>
        Gen.Select(CategoryPairs, AnyOptions).Sample((pairs, options) =>
        {
            var method = PairMethods.Categories[name];
            var plain = Run(method, pairs, options);
            var swapped = Run(method, [.. pairs.Select(p => (p.Reference, p.Index))], options);
            var recoded = Run(method, [.. pairs.Select(p => (-p.Index * p.Index, -p.Reference * p.Reference))], options);
            foreach (var other in new[] { swapped, recoded })
            {
                Assert.Equal(plain.Outcome, other.Outcome);
                Assert.Equal(plain.Remarks, other.Remarks);
                Assert.Equal(plain.DegreesOfFreedom, other.DegreesOfFreedom);
                Near(plain.Statistic, other.Statistic);
                Near(plain.P.Log10, other.P.Log10);
            }

            Assert.Equal(options.Sides != Sides.Two && plain.Outcome == Outcome.Tested, plain.Remarks.HasFlag(Remarks.TwoSidedOnly));
            if (plain.Outcome == Outcome.Tested)
                Assert.InRange(plain.P.Value, 0, 1);
        });

    [Theory]
    [MemberData(nameof(Measured))]
    public void A_change_of_unit_scales_what_has_a_unit_and_nothing_else(string name) =>
        Gen.Select(Pairs, AnyOptions, Gen.OneOf(Gen.Const(1000.0), Gen.Const(0.01), Gen.Const(25.4))).Sample((pairs, options, factor) =>
        {
            var plain = Run(PairMethods.Measured[name], pairs, options);
            var scaled = Run(PairMethods.Measured[name], [.. pairs.Select(p => (p.Index * factor, p.Reference * factor))], options);
            Assert.Equal(plain.Outcome, scaled.Outcome);
            Assert.Equal(plain.Remarks, scaled.Remarks);
            Near(plain.P.Log10, scaled.P.Log10);
            Near(plain.Statistic, scaled.Statistic);
            Near(plain.EffectSize, scaled.EffectSize);
            Near(plain.Estimate * factor, scaled.Estimate);
            Near(plain.StandardError * factor, scaled.StandardError);
            Near(plain.Interval.Low * factor, scaled.Interval.Low);
            Near(plain.Interval.High * factor, scaled.Interval.High);
        });

    [Theory]
    [InlineData("paired-t")]
    [InlineData("signed-rank")]
    [InlineData("signed-rank, pratt")]
    [InlineData("sign")]
    public void Without_ties_and_zeros_the_interval_excludes_zero_exactly_when_p_is_below_one_minus_the_confidence(string name) =>
        Gen.Select(Untied, AnyOptions).Sample((pairs, options) =>
        {
            var result = Run(PairMethods.Measured[name], pairs, options);
            Assert.Equal(Outcome.Tested, result.Outcome);
            Assert.False(result.Remarks.HasFlag(Remarks.Ties) || result.Remarks.HasFlag(Remarks.Zeros));
            IntervalLaw.Holds(result.P.Value, result.Interval, options.Confidence);
        });

    [Theory]
    [InlineData("paired-t")]
    [InlineData("paired-t, adjusted")]
    [InlineData("moderated-paired-t")]
    [InlineData("trimmed-mean")]
    [InlineData("within-pair-slope")]
    [InlineData("sign-flip")]
    public void Where_the_interval_inverts_the_test_it_excludes_zero_exactly_when_p_says_so_with_ties_and_zeros_too(string name) =>
        Gen.Select(Coarse.Array[2, 70], AnyOptions).Sample((pairs, options) =>
        {
            var result = Run(PairMethods.Measured[name], pairs, options);
            if (result.Outcome == Outcome.Tested)
                IntervalLaw.Holds(result.P.Value, result.Interval, options.Confidence);
        });

    [Fact]
    public void The_interval_of_the_rate_ratio_excludes_one_exactly_when_p_is_below_one_minus_the_confidence() =>
        Gen.Select(CountPairs, AnyOptions).Sample((pairs, options) =>
        {
            var result = Run(PairMethods.Counts["paired-poisson"], pairs, options);
            if (result.Outcome == Outcome.Tested)
                IntervalLaw.Holds(result.P.Value, result.Interval, options.Confidence);
        });

    [Fact]
    public void The_exact_McNemar_interval_excludes_zero_exactly_when_p_is_below_one_minus_the_confidence() =>
        Gen.Select(BinaryPairs, AnyOptions).Sample((pairs, options) =>
        {
            var result = Run(PairMethods.Binary["mcnemar-exact"], pairs, options);
            if (result.Outcome == Outcome.Tested)
                IntervalLaw.Holds(result.P.Value, result.Interval, options.Confidence);
        });

    [Theory]
    [InlineData(40)]
    [InlineData(120)]
    [InlineData(520)]
    public void Signed_rank_excludes_zero_exactly_when_p_says_so_at_every_confidence_on_one_sample(int n)
    {
        var random = new Random(n);
        (double, double)[] pairs = [.. Enumerable.Range(0, n).Select(_ => (random.NextDouble(), random.NextDouble() - 0.1))];
        for (int percent = 1; percent < 1000; percent++)
        {
            var options = new TestOptions { Confidence = percent / 1000.0 };
            var result = Run(PairMethods.Measured["signed-rank"], pairs, options);
            IntervalLaw.Holds(result.P.Value, result.Interval, options.Confidence);
        }
    }

    private static void Mirrors(PairMethod method, Gen<(double Index, double Reference)[]> values) =>
        Gen.Select(values, AnyOptions).Sample((pairs, options) =>
        {
            var opposite = options with
            {
                Sides = options.Sides switch { Sides.Greater => Sides.Less, Sides.Less => Sides.Greater, _ => Sides.Two },
            };
            var plain = Run(method, pairs, options);
            var swapped = Run(method, [.. pairs.Select(p => (p.Reference, p.Index))], opposite);
            Assert.Equal(plain.Outcome, swapped.Outcome);
            Assert.Equal(plain.Remarks, swapped.Remarks);
            Near(plain.P.Value, swapped.P.Value);
            Near(plain.P.Log10, swapped.P.Log10);
            Near(plain.SmallestPossibleP.Log10, swapped.SmallestPossibleP.Log10);
            Near(plain.Estimate, -swapped.Estimate);
            Near(plain.StandardError, swapped.StandardError);
            Near(plain.Interval.Low, -swapped.Interval.High);
            Near(plain.Interval.High, -swapped.Interval.Low);
            Near(plain.EffectSize, -swapped.EffectSize);
        });

    private static void IsSound(PairMethod method, Gen<(double Index, double Reference)[]> values) =>
        Gen.Select(values, AnyOptions).Sample((pairs, options) =>
        {
            var result = Run(method, pairs, options);
            Assert.Equal(pairs.Length, result.Sets);
            Assert.Equal(2 * pairs.Length, result.Samples);
            Assert.Equal(result.Outcome != Outcome.Tested, result.P.IsMissing);
            if (result.Outcome != Outcome.Tested)
                return;
            Assert.InRange(result.P.Value, 0, 1);
            Near(Math.Log10(result.P.Value), result.P.Log10);
            Assert.True(result.SmallestPossibleP.IsMissing || result.P.Log10 >= result.SmallestPossibleP.Log10 - 1e-12);
            // Limits from random flips are order statistics; near a confidence of one half chance may put them on the other side.
            if (result.Remarks.HasFlag(Remarks.Resampled) && options.Confidence < 0.65)
                return;
            // A limit may be the estimate itself, each with its own rounding.
            double rounding = 1e-14 * pairs.Max(p => Math.Max(Math.Abs(p.Index), Math.Abs(p.Reference)));
            if (options.Sides != Sides.Greater)
                Assert.True(result.Interval.High >= result.Estimate - rounding, $"{result}");
            else
                Assert.Equal(double.PositiveInfinity, result.Interval.High);
            if (options.Sides != Sides.Less)
                Assert.True(result.Interval.Low <= result.Estimate + rounding, $"{result}");
            else
                Assert.Equal(double.NegativeInfinity, result.Interval.Low);
        });

    private static TestResult Run(PairMethod method, (double Index, double Reference)[] pairs, TestOptions options) =>
        method([.. pairs.Select(p => p.Index)], [.. pairs.Select(p => p.Reference)], options);

    private static void Near(double expected, double actual)
    {
        if (double.IsFinite(expected))
            Assert.Equal(expected, actual, tolerance: 1e-9 * Math.Max(1, Math.Abs(expected)));
        else
            Assert.Equal(expected, actual);
    }
}
