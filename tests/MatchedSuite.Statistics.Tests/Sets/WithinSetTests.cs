using CsCheck;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Statistics.Tests.Sets;

public class WithinSetTests
{
    private static readonly Dictionary<string, SetMethod> Methods = new()
    {
        ["within-set-linear"] = WithinSetLinear.Run,
        ["within-set-robust"] = WithinSetRobust.Run,
    };

    public static TheoryData<string> Names => [.. Methods.Keys];

    [Theory]
    [MemberData(nameof(Names))]
    public void One_to_one_sets_give_the_paired_t_test(string name) =>
        DrawnSets.Pairs(2, 25).Sample(sets =>
        {
            TestResult found = sets.Run(Methods[name]);
            var scratch = new Scratch();
            using Scratch.Frame frame = scratch.Open();
            TestResult paired = PairedT.Run(
                PairSample.Of(
                    [.. Enumerable.Range(0, sets.Count).Select(s => sets.Split(s).Index[0])],
                    [.. Enumerable.Range(0, sets.Count).Select(s => sets.Split(s).Reference[0])],
                    frame),
                TestOptions.Default,
                scratch);
            if (paired.Outcome != Outcome.Tested)
            {
                Assert.Contains(found.Outcome, new[] { Outcome.NoVariation, Outcome.NothingDiffers });
                return;
            }

            SetLaws.AreEqual(paired with { EffectSize = found.EffectSize }, found, 1, 1e-9);
        });

    [Theory]
    [MemberData(nameof(Names))]
    public void Swapping_the_roles_turns_every_sign(string name) =>
        DrawnSets.AnyShape(2, 15, covariates: 1).Sample(sets =>
            SetLaws.AreMirrored(sets.Run(Methods[name]), sets.Swapped().Run(Methods[name]), 1e-8));

    [Theory]
    [MemberData(nameof(Names))]
    public void Another_unit_and_another_origin_change_nothing_without_unit(string name) =>
        DrawnSets.AnyShape(2, 15, covariates: 1).Sample(sets =>
            SetLaws.AreEqual(sets.Run(Methods[name]), sets.With(value => (value * 8) + 64).Run(Methods[name]), 8, 1e-8));

    [Theory]
    [MemberData(nameof(Names))]
    public void The_order_of_sets_and_members_plays_no_part(string name) =>
        DrawnSets.AnyShape(2, 15, covariates: 2).Sample(sets =>
            SetLaws.AreEqual(sets.Run(Methods[name]), sets.Turned().Run(Methods[name]), 1, 1e-7));

    [Theory]
    [MemberData(nameof(Names))]
    public void The_interval_excludes_zero_exactly_when_p_is_below_one_minus_confidence(string name) =>
        SetLaws.IntervalAgreesWithP(Methods[name], DrawnSets.AnyShape(2, 15));

    [Theory]
    [MemberData(nameof(Names))]
    public void An_offset_of_a_billion_loses_no_digit_that_the_values_still_have(string name) =>
        DrawnSets.AnyShape(4, 15).Sample(sets =>
        {
            DrawnSets eighths = sets.With(value => Math.Round(value * 8) / 8);
            TestResult before = eighths.Run(Methods[name]);
            if (before.Outcome == Outcome.Tested && before.StandardError > 1e-3)
                SetLaws.AreEqual(before, eighths.With(value => value + 1e9).Run(Methods[name]), 1, 1e-10);
        });

    [Theory]
    [MemberData(nameof(Names))]
    public void What_cannot_be_tested_says_why(string name)
    {
        bool[] roles = [true, false, true, false, true, false];
        int[] starts = [0, 2, 4, 6];
        Assert.Equal(Outcome.NothingDiffers, new DrawnSets([1, 1, 2, 2, 3, 3], starts, roles, []).Run(Methods[name]).Outcome);
        Assert.Equal(Outcome.NoVariation, new DrawnSets([1.3, 1.1, 2.3, 2.1, 3.3, 3.1], starts, roles, []).Run(Methods[name]).Outcome);
        Assert.Equal(Outcome.TooFewSets, new DrawnSets([1, 2], [0, 2], [true, false], []).Run(Methods[name]).Outcome);
        Assert.Equal(Outcome.Collinear, new DrawnSets([1, 4, 2, 3, 3, 5], starts, roles, [3, 2, 7, 6, 1, 0]).Run(Methods[name]).Outcome);
    }
}
