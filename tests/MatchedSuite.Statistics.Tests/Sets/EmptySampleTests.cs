using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Statistics.Tests.Sets;

public class EmptySampleTests
{
    private static readonly double[] Levels = [0, 1];

    private static readonly Dictionary<string, SetMethod> Methods = new()
    {
        ["conditional-logistic"] = ConditionalLogistic.Run,
        ["conditional-logistic by levels"] = (in SetSample sets, TestOptions options, Scratch scratch) =>
            ConditionalLogisticCategories.Run(sets, Levels, options, scratch),
        ["within-set-linear"] = WithinSetLinear.Run,
        ["within-set-robust"] = WithinSetRobust.Run,
        ["aligned-rank"] = AlignedRank.Run,
        ["set-relabel"] = SetRelabel.Run,
        ["mantel-haenszel"] = MantelHaenszel.Run,
    };

    public static TheoryData<string> Names => [.. Methods.Keys];

    [Theory]
    [MemberData(nameof(Names))]
    public void Where_no_set_keeps_both_roles_there_is_no_test_and_a_reason(string name)
    {
        DrawnSets lost = new([1, double.NaN, 0, double.NaN, 1], [0, 2, 5], [true, false, true, false, true], []);
        foreach (DrawnSets sets in new[] { lost, lost with { Covariates = [1, 2, 3, 4, 5] }, new DrawnSets([], [0], [], []) })
        {
            TestResult result = sets.Run(Methods[name]);
            Assert.Equal((Outcome.TooFewSets, Remarks.TooFewSets), (result.Outcome, result.Remarks & Remarks.TooFewSets));
            Assert.Equal((0, 0), (result.Sets, result.Samples));
            Assert.True(result.P.IsMissing);
        }
    }
}
