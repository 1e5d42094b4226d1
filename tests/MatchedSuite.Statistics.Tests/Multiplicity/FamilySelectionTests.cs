using CsCheck;
using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Statistics.Tests.Multiplicity;

public class FamilySelectionTests
{
    private static readonly Gen<(Probability[] P, int[] FamilyOf)> Studies =
        Gen.Select(PValueVectors.MaybeMissing, Gen.Int[0, 6]).Array[1, 40].Select(rows => (Array.ConvertAll(rows, row => row.Item1), Array.ConvertAll(rows, row => row.Item2)));

    [Fact]
    public void At_every_level_it_rejects_what_selection_and_then_testing_within_reject() =>
        Gen.Select(Studies, PValueVectors.Levels(0.002, 0.7)).Sample((study, level) =>
        {
            var families = new Families(study.FamilyOf);
            var adjusted = new Probability[study.P.Length];
            FamilySelection.Adjust(study.P, families, adjusted);
            bool[] rejected = RejectedAt(study.P, families, level);
            for (int i = 0; i < adjusted.Length; i++)
                Assert.Equal(rejected[i], adjusted[i].IsAtMost(level));
        });

    [Fact]
    public void One_family_gives_the_step_up_of_Benjamini_and_Hochberg() =>
        PValueVectors.UpTo(30).Where(p => p.Length > 0).Sample(p =>
        {
            var adjusted = new Probability[p.Length];
            FamilySelection.Adjust(p, new Families(new int[p.Length]), adjusted);
            Assert.Equal(PValueVectors.Adjusted(BenjaminiHochberg.Adjust, p), adjusted);
        });

    [Fact]
    public void Families_of_one_hypothesis_each_give_the_step_up_over_all_of_them() =>
        PValueVectors.UpTo(30).Sample(p =>
        {
            var adjusted = new Probability[p.Length];
            FamilySelection.Adjust(p, new Families([.. Enumerable.Range(0, p.Length)]), adjusted);
            var all = PValueVectors.Adjusted(BenjaminiHochberg.Adjust, p);
            for (int i = 0; i < p.Length; i++)
                Assert.True(PValueVectors.Close(all[i], adjusted[i]));
        });

    private static bool[] RejectedAt(Probability[] p, Families families, double level)
    {
        var simes = Simes.OfEach(p, families);
        var selected = PValueVectors.Adjusted(BenjaminiHochberg.Adjust, simes);
        int tested = selected.Count(one => !one.IsMissing);
        int count = selected.Count(one => one.IsAtMost(level));
        var within = new Probability[p.Length];
        families.AdjustEach(BenjaminiHochberg.Adjust, p, within);
        var rejected = new bool[p.Length];
        for (int family = 0; family < families.Count; family++)
        {
            foreach (int at in families.Members(family))
                rejected[at] = selected[family].IsAtMost(level) && within[at].IsAtMost(level * count / tested);
        }

        return rejected;
    }
}
