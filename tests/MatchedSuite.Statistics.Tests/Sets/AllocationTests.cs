using MatchedSuite.Statistics.Sets;
using MatchedSuite.Tests;

namespace MatchedSuite.Statistics.Tests.Sets;

public class AllocationTests
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

    private static readonly string[] BinaryMethods = ["conditional-logistic by levels", "mantel-haenszel"];

    public static TheoryData<string> Names => [.. Methods.Keys];

    [Theory]
    [MemberData(nameof(Names))]
    public void Nothing_is_allocated_for_a_further_endpoint(string name)
    {
        // 50 sets of 1:3, then 25 of 2:2, with a covariate.
        var random = new Random(3);
        var sets = new DrawnSets(
            [.. Enumerable.Range(0, 300).Select(_ => BinaryMethods.Contains(name) ? random.Next(2) : random.NextDouble())],
            [.. Enumerable.Range(0, 76).Select(s => s * 4)],
            [.. Enumerable.Range(0, 300).Select(i => i % 4 == 0 || (i >= 200 && i % 4 == 1))],
            [.. Enumerable.Range(0, 300).Select(_ => random.NextDouble())]);
        TestOptions options = new() { Resamples = 99 };
        var scratch = new Scratch();
        Assert.Equal(Outcome.Tested, Once());
        Assert.Equal(0, Allocated.Least(() => Once()));

        Outcome Once()
        {
            using Scratch.Frame frame = scratch.Open();
            return Methods[name](sets.Take(frame), options, scratch).Outcome;
        }
    }
}
