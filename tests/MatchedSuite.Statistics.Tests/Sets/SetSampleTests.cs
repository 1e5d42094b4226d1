using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Statistics.Tests.Sets;

public class SetSampleTests
{
    private static readonly int[] Starts = [0, 3, 6, 8];
    private static readonly bool[] IsIndex = [false, true, false, true, false, true, false, true];

    [Fact]
    public void Members_with_the_index_role_come_first_and_keep_their_order()
    {
        using Scratch.Frame frame = new Scratch().Open();
        SetSample sets = SetSample.Of([1, 2, 3, 4, 5, 6, 7, 8], Starts, IsIndex, frame);
        Assert.Equal([2, 1, 3, 4, 6, 5, 8, 7], sets.Values.ToArray());
        Assert.Equal([1, 2, 1], sets.IndexCounts.ToArray());
        Assert.Equal(Starts, sets.Starts.ToArray());
        Assert.Equal(default, sets.Lost);
    }

    [Fact]
    public void A_missing_value_or_covariate_takes_its_member_and_a_lost_role_takes_the_set()
    {
        using Scratch.Frame frame = new Scratch().Open();
        double[] covariate = [1, 1, double.NaN, 1, 1, 1, 1, 1];
        SetSample sets = SetSample.Of([1, 2, 3, 4, double.NaN, 6, 7, 8], Starts, IsIndex, covariate, frame);
        Assert.Equal([2, 1, 8, 7], sets.Values.ToArray());
        Assert.Equal([0, 2, 4], sets.Starts.ToArray());
        Assert.Equal(new SetSample.Losses(2, 1, 2), sets.Lost);
        Assert.Equal([1, 1, 1, 1], sets.Covariate(0).ToArray());
    }

    [Fact]
    public void Complete_members_that_lie_in_order_are_taken_as_they_are()
    {
        using Scratch.Frame frame = new Scratch().Open();
        double[] values = [2, 1, 3, 4, 6, 5, 8, 7], covariate = [1, 2, 3, 4, 5, 6, 7, 8];
        SetSample copied = SetSample.Of(values, Starts, [true, false, false, true, true, false, true, false], covariate, frame);
        SetSample taken = SetSample.OfComplete(values, Starts, [1, 2, 1], covariate);
        Assert.Equal(copied.Values.ToArray(), taken.Values.ToArray());
        Assert.Equal(copied.IndexCounts.ToArray(), taken.IndexCounts.ToArray());
        Assert.Equal(copied.Covariate(0).ToArray(), taken.Covariate(0).ToArray());
        Assert.Equal(copied.Lost, taken.Lost);
        Assert.Throws<ArgumentException>(() => SetSample.OfComplete(values, Starts, [1, 3, 1], covariate).Sets);
        Assert.Throws<ArgumentException>(() => SetSample.OfComplete(values, Starts, [0, 2, 1], covariate).Sets);
        Assert.Throws<ArgumentException>(() => SetSample.OfComplete(values, Starts, [1, 2], covariate).Sets);
    }

    [Fact]
    public void Lengths_that_do_not_fit_are_refused()
    {
        Assert.Throws<ArgumentException>(() => Take([0, 2], [true, false], []));
        Assert.Throws<ArgumentException>(() => Take([0, 3], [true, false], []));
        Assert.Throws<ArgumentException>(() => Take([0, 4, 3], [true, false, true], []));
        Assert.Throws<ArgumentException>(() => Take([0, 3], [true, false, true], [1, 2]));

        static void Take(int[] starts, bool[] isIndex, double[] covariates)
        {
            using Scratch.Frame frame = new Scratch().Open();
            SetSample.Of([1, 2, 3], starts, isIndex, covariates, frame);
        }
    }
}
