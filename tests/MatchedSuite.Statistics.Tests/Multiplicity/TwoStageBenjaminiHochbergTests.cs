using CsCheck;
using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Statistics.Tests.Multiplicity;

public class TwoStageBenjaminiHochbergTests
{
    [Fact]
    public void At_every_level_the_adjusted_p_values_reject_what_the_two_stages_reject() =>
        Gen.Select(PValueVectors.CompleteUpTo(30), PValueVectors.Levels(0.002, 0.9)).Sample((p, level) =>
        {
            var any = PValueVectors.Adjusted(TwoStageBenjaminiHochberg.Adjust, p);
            var one = new Probability[p.Length];
            TwoStageBenjaminiHochberg.Adjust(p, level, one);
            var first = PValueVectors.Adjusted(BenjaminiHochberg.Adjust, p);
            int rejected = first.Count(b => b.IsAtMost(level / (1 + level)));
            double second = level / (1 + level) * p.Length / Math.Max(1, p.Length - rejected);
            for (int i = 0; i < p.Length; i++)
            {
                bool expected = rejected == p.Length || first[i].IsAtMost(second);
                Assert.Equal(expected, any[i].IsAtMost(level));
                Assert.Equal(expected, one[i].IsAtMost(level));
            }
        });
}
