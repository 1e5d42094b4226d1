using CsCheck;
using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Statistics.Tests.Multiplicity;

public class AdjustmentLawTests
{
    private static readonly Dictionary<string, Adjustment> Procedures = new()
    {
        ["bonferroni"] = Bonferroni.Adjust,
        ["sidak"] = Sidak.Adjust,
        ["holm"] = Holm.Adjust,
        ["holm-sidak"] = HolmSidak.Adjust,
        ["hochberg"] = Hochberg.Adjust,
        ["hommel"] = Hommel.Adjust,
        ["bh"] = BenjaminiHochberg.Adjust,
        ["by"] = BenjaminiYekutieli.Adjust,
        ["two-stage-bh"] = TwoStageBenjaminiHochberg.Adjust,
        ["storey-q"] = StoreyQ.Adjust,
    };

    public static TheoryData<string> Names => [.. Procedures.Keys];

    [Theory]
    [MemberData(nameof(Names))]
    public void Adjusted_p_values_keep_the_order_of_the_p_values_and_never_exceed_one(string name) =>
        PValueVectors.UpTo(30).Sample(p =>
        {
            var adjusted = PValueVectors.Adjusted(Procedures[name], p);
            for (int i = 0; i < p.Length; i++)
            {
                Assert.Equal(p[i].IsMissing, adjusted[i].IsMissing);
                if (p[i].IsMissing)
                    continue;
                Assert.InRange(adjusted[i].Value, 0, 1);
                Assert.True(adjusted[i].Log10 <= 0);
                for (int j = 0; j < p.Length; j++)
                {
                    if (p[i] < p[j])
                        Assert.True(adjusted[i] <= adjusted[j]);
                    else if (p[i].CompareTo(p[j]) == 0)
                        Assert.Equal(0, adjusted[i].CompareTo(adjusted[j]));
                }
            }
        });

    [Theory]
    [MemberData(nameof(Names))]
    public void Permuting_the_hypotheses_permutes_the_adjusted_p_values(string name) =>
        PValueVectors.UpTo(30).SelectMany(p => Gen.Shuffle(Enumerable.Range(0, p.Length).ToArray()), (p, order) => (p, order)).Sample(draw =>
        {
            var (p, order) = draw;
            var adjusted = PValueVectors.Adjusted(Procedures[name], p);
            var permuted = PValueVectors.Adjusted(Procedures[name], Array.ConvertAll(order, at => p[at]));
            for (int i = 0; i < order.Length; i++)
                Assert.Equal(0, permuted[i].CompareTo(adjusted[order[i]]));
        });

    [Theory]
    [MemberData(nameof(Names))]
    public void Missing_p_values_change_nothing_for_the_others(string name) =>
        PValueVectors.UpTo(30).Sample(p =>
        {
            var among = PValueVectors.Adjusted(Procedures[name], p);
            var alone = PValueVectors.Adjusted(Procedures[name], [.. p.Where(one => !one.IsMissing)]);
            Assert.Equal(alone, among.Where(one => !one.IsMissing));
        });

    [Theory]
    [MemberData(nameof(Names))]
    public void A_smaller_p_value_makes_no_adjusted_p_value_larger(string name) =>
        Gen.Select(PValueVectors.CompleteUpTo(20), Gen.Int[0, 19], Gen.Double[0, 1]).Sample((p, at, factor) =>
        {
            at %= p.Length;
            var before = PValueVectors.Adjusted(Procedures[name], p);
            p[at] = p[at].Times(factor);
            var after = PValueVectors.Adjusted(Procedures[name], p);
            for (int i = 0; i < p.Length; i++)
                Assert.True(PValueVectors.AtMost(after[i], before[i]), $"{before[i]} became {after[i]}");
        });

    [Theory]
    [InlineData("holm", "bonferroni")]
    [InlineData("sidak", "bonferroni")]
    [InlineData("holm-sidak", "holm")]
    [InlineData("holm-sidak", "sidak")]
    [InlineData("hochberg", "holm")]
    [InlineData("hommel", "hochberg")]
    [InlineData("bh", "hommel")]
    [InlineData("bh", "by")]
    [InlineData("storey-q", "bh")]
    public void The_stronger_procedure_is_never_above_the_weaker_one(string stronger, string weaker) =>
        PValueVectors.CompleteUpTo(40).Sample(p =>
        {
            var small = PValueVectors.Adjusted(Procedures[stronger], p);
            var large = PValueVectors.Adjusted(Procedures[weaker], p);
            for (int i = 0; i < p.Length; i++)
                Assert.True(PValueVectors.AtMost(small[i], large[i]), $"{stronger} {small[i]}, {weaker} {large[i]}");
        });

    [Theory]
    [MemberData(nameof(Names))]
    public void One_hypothesis_keeps_its_p_value_to_the_bit(string name)
    {
        // The two-stage adjustment pays q/(1 + q) for its first stage even then.
        if (name == "two-stage-bh")
            Assert.Equal(0.0371 / (1 - 0.0371), PValueVectors.Adjusted(Procedures[name], [Probability.Of(0.0371)])[0].Value, 1e-15);
        else
            Assert.Equal(Probability.Of(0.0371), PValueVectors.Adjusted(Procedures[name], [Probability.Of(0.0371)])[0]);
    }

    [Theory]
    [MemberData(nameof(Names))]
    public void An_empty_family_or_one_without_p_values_is_left_as_it_is(string name)
    {
        Assert.Empty(PValueVectors.Adjusted(Procedures[name], []));
        Assert.True(PValueVectors.Adjusted(Procedures[name], [Probability.Missing])[0].IsMissing);
        Assert.Throws<ArgumentException>(() => Procedures[name]([Probability.One], new Probability[2]));
    }

    [Theory]
    [MemberData(nameof(Names))]
    public void P_values_far_below_the_range_of_doubles_are_adjusted_as_their_scaled_copies_are(string name)
    {
        // All p and all adjusted p scale together while they are small.
        Probability[] small = [.. Enumerable.Range(1, 12).Select(i => Probability.FromLog10(-12 - Math.Log10(i * i)))];
        Probability[] tiny = [.. Enumerable.Range(1, 12).Select(i => Probability.FromLog10(-5012 - Math.Log10(i * i)))];
        var expected = PValueVectors.Adjusted(Procedures[name], small);
        var found = PValueVectors.Adjusted(Procedures[name], tiny);
        for (int i = 0; i < small.Length; i++)
            Assert.Equal(expected[i].Log10 - 5000, found[i].Log10, 1e-9);
    }
}
