using CsCheck;

namespace MatchedSuite.Statistics.Tests;

public class RankNormalScoresTests
{
    [Fact]
    public void Order_alone_matters_reversal_changes_signs_and_missing_values_stay_missing() =>
        Gen.Int[-9, 9].Array[1, 60].Sample(codes =>
        {
            double[] values = [.. codes.Select(v => v == 0 ? double.NaN : v)];
            double[] scores = Scores(values), stretched = Scores([.. values.Select(v => v * v * v)]), reversed = Scores([.. values.Select(v => -v)]);
            Assert.Equal(scores, stretched);
            for (int i = 0; i < codes.Length; i++)
            {
                Assert.Equal(codes[i] == 0, double.IsNaN(scores[i]));
                if (codes[i] != 0)
                    Assert.Equal(-scores[i], reversed[i]);
                for (int j = 0; j < codes.Length; j++)
                {
                    if (codes[i] != 0 && codes[j] != 0)
                        Assert.Equal(codes[i].CompareTo(codes[j]), scores[i].CompareTo(scores[j]));
                }
            }
        });

    [Fact]
    public void Scores_may_replace_the_values_in_place_and_the_lengths_must_agree()
    {
        double[] values = [3, 1, 2];
        RankNormalScores.Of(values, values, new Scratch());
        Assert.Equal(Scores([3, 1, 2]), values);
        Assert.Equal(0, values[2]);
        Assert.Throws<ArgumentException>(() => RankNormalScores.Of([1, 2], new double[3], new Scratch()));
    }

    private static double[] Scores(double[] values)
    {
        var scores = new double[values.Length];
        RankNormalScores.Of(values, scores, new Scratch());
        return scores;
    }
}
