using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Statistics.Tests.Multiplicity;

public class FamiliesTests
{
    [Fact]
    public void Each_family_is_adjusted_as_if_there_were_no_other()
    {
        var adjusted = new Probability[5];
        new Families([1, 0, 1, 3, 0]).AdjustEach(Bonferroni.Adjust, Probabilities(0.01, 0.02, double.NaN, 0.3, 0.4), adjusted);
        Assert.Equal([0.01, 0.04, double.NaN, 0.3, 0.8], Array.ConvertAll(adjusted, one => one.Value));
    }

    [Fact]
    public void A_family_without_members_is_empty_and_has_no_global_p_value()
    {
        var families = new Families([2, 0, 2]);
        Assert.Equal(3, families.Count);
        Assert.Equal([0, 2], families.Members(2).ToArray());
        Assert.True(families.Members(1).IsEmpty);
        var global = Simes.OfEach(Probabilities(0.01, 0.5, 0.04), families);
        Assert.Equal([0.5, double.NaN, 0.02], Array.ConvertAll(global, one => one.Value));
    }

    [Fact]
    public void A_gate_opens_when_all_before_it_are_rejected()
    {
        // Family 0: Holm 0.02, 0.03. Family 1: Holm 0.002, 0.04, held up to 0.03. Family 2: held up to 0.04.
        var adjusted = new Probability[6];
        GatekeeperHolm.Adjust(Probabilities(0.01, 0.001, 0.03, 0.04, 0.0005, double.NaN), new Families([0, 1, 0, 1, 2, 0]), adjusted);
        Assert.Equal([0.02, 0.03, 0.03, 0.04, 0.04, double.NaN], Array.ConvertAll(adjusted, one => one.Value));
    }

    [Fact]
    public void One_family_behind_the_gate_is_Holm_and_families_of_one_are_the_fixed_sequence()
    {
        var p = Probabilities(0.02, 0.001, double.NaN, 0.3, 0.04);
        var gate = new Probability[5];
        GatekeeperHolm.Adjust(p, new Families([0, 0, 0, 0, 0]), gate);
        Assert.Equal(PValueVectors.Adjusted(Holm.Adjust, p), gate);
        GatekeeperHolm.Adjust(p, new Families([0, 1, 2, 3, 4]), gate);
        Assert.Equal(PValueVectors.Adjusted(FixedSequence.Adjust, p), gate);
        Assert.Equal([0.02, 0.02, double.NaN, 0.3, 0.3], Array.ConvertAll(gate, one => one.Value));
    }

    [Fact]
    public void A_negative_family_number_or_a_wrong_length_is_refused()
    {
        Assert.Throws<ArgumentException>(() => new Families([0, -1]));
        Assert.Throws<ArgumentException>(() => new Families([0]).AdjustEach(Holm.Adjust, new Probability[2], new Probability[2]));
        Assert.Throws<ArgumentException>(() => Simes.OfEach(new Probability[2], new Families([0])));
    }

    private static Probability[] Probabilities(params double[] values) => Array.ConvertAll(values, Probability.Of);
}
