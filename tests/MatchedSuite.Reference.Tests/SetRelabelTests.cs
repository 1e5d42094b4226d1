using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Reference.Tests;

/// <summary>
/// On 1:1 sets relabeling within sets is the sign-flip test of the mean difference. Values: all flips of exact fractions
/// (Inputs/README.md, signflip_mean.exact).
/// </summary>
public class SetRelabelTests
{
    [Theory]
    [InlineData("sleep", "drug1", "drug2")]
    [InlineData("darwin_maize", "cross", "self")]
    [InlineData("hw_depression", "before", "after")]
    [InlineData("shoes", "A", "B")]
    [InlineData("twins_hippocampus", "unaffected", "affected")]
    [InlineData("zeros_ties", "a", "b")]
    public void Pairs_give_the_counts_of_the_exact_sign_flip_test(string dataset, string index, string reference)
    {
        double all = Expected.Value(dataset, "signflip_mean.exact", "n_flips");
        TestResult two = Run(dataset, index, reference, Sides.Two);
        Assert.Equal(Expected.Value(dataset, "signflip_mean.exact", "count_greater"), Run(dataset, index, reference, Sides.Greater).P.Value * all);
        Assert.Equal(Expected.Value(dataset, "signflip_mean.exact", "count_less"), Run(dataset, index, reference, Sides.Less).P.Value * all);
        Assert.Equal(Expected.Value(dataset, "signflip_mean.exact", "count_two"), two.P.Value * all);
        Assert.Equal(Remarks.Exact, two.Remarks & Remarks.Exact);
        Assert.Equal(2 / all, two.SmallestPossibleP.Value);
    }

    [Fact]
    public void One_to_four_sets_give_the_counts_of_every_relabeling_in_base_R()
    {
        // Mack et al. (1976), months of oestrogen use by category, the first eight sets: all 5^8 sums by outer(), base R 4.2.2.
        var scratch = new Scratch();
        using Scratch.Frame frame = scratch.Open();
        SetSample sets = ReferenceSets.FirstOf("bdendo", "dur", 8, frame);
        TestResult greater = SetRelabel.Run(sets, new TestOptions { Sides = Sides.Greater }, scratch);
        TestResult less = SetRelabel.Run(sets, new TestOptions { Sides = Sides.Less }, scratch);
        Assert.Equal(14.25, greater.Statistic, 1e-12);
        Assert.Equal(14.25 / 8, greater.Estimate, 1e-12);
        Assert.Equal(910.0 / 390625, greater.P.Value, 1e-15);
        Assert.Equal(390260.0 / 390625, less.P.Value, 1e-15);
    }

    private static TestResult Run(string dataset, string index, string reference, Sides sides)
    {
        ReferenceTable table = Expected.Table(dataset);
        double[] values = [.. table.Numbers(index).Zip(table.Numbers(reference)).SelectMany(pair => new[] { pair.First, pair.Second })];
        var scratch = new Scratch();
        using Scratch.Frame frame = scratch.Open();
        SetSample sets = SetSample.Of(
            values,
            [.. Enumerable.Range(0, (values.Length / 2) + 1).Select(s => 2 * s)],
            [.. Enumerable.Range(0, values.Length).Select(i => i % 2 == 0)],
            frame);
        return SetRelabel.Run(sets, new TestOptions { Sides = sides }, scratch);
    }
}
