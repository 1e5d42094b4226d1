using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Multiplicity;
using MatchedSuite.Statistics.Multiplicity.Resampling;

namespace MatchedSuite.Reference.Tests;

/// <summary>The worked examples of the pages on adjustments show what the adjustments compute.</summary>
public class AdjustmentWorkedExamplesTests
{
    private static readonly double[] Five = [0.005, 0.011, 0.02, 0.04, 0.13];
    private static readonly double[] Weighted = [0.01, 0.02, 0.015, 0.04, 0.3, 0.008];
    private static readonly double[] Weights = [3, 1, 2, 0.5, 2, 0.25];

    public static TheoryData<string, Adjustment> OnFive => new()
    {
        { "bonferroni", Bonferroni.Adjust },
        { "sidak", Sidak.Adjust },
        { "holm", Holm.Adjust },
        { "holm-sidak", HolmSidak.Adjust },
        { "hochberg", Hochberg.Adjust },
        { "hommel", Hommel.Adjust },
        { "bh", BenjaminiHochberg.Adjust },
        { "by", BenjaminiYekutieli.Adjust },
        { "two-stage-bh", TwoStageBenjaminiHochberg.Adjust },
        { "storey-q", StoreyQ.Adjust },
    };

    [Theory]
    [MemberData(nameof(OnFive), DisableDiscoveryEnumeration = true)]
    public void Pages_with_the_five_p_values(string name, Adjustment procedure) =>
        ShowsEach(name, Five, Adjusted(procedure, Five));

    [Fact]
    public void Weighted_pages()
    {
        var adjusted = new Probability[6];
        Holm.Adjust(Probabilities(Weighted), Weights, adjusted);
        ShowsWeighted("holm", adjusted);
        WeightedBenjaminiHochberg.Adjust(Probabilities(Weighted), Weights, adjusted);
        ShowsWeighted("weighted-bh", adjusted);
    }

    [Fact]
    public void Share_of_true_nulls_on_the_storey_page() =>
        MethodPage.Of("storey-q").Shows("π0", $"{StoreyPi0.AtFixed(Probabilities(Five))}");

    [Fact]
    public void Fixed_sequence_page()
    {
        double[] p = [0.01, 0.03, 0.02, 0.2, 0.001];
        ShowsEach("fixed-sequence", p, Adjusted(FixedSequence.Adjust, p));
    }

    [Fact]
    public void Gatekeeper_page()
    {
        double[] p = [0.01, 0.03, 0.001, 0.04, 0.0005];
        int[] families = [0, 0, 1, 1, 2];
        ShowsFamilies("gatekeeper-holm", p, families, Adjusted((own, adjusted) => GatekeeperHolm.Adjust(own, new Families(families), adjusted), p));
    }

    [Fact]
    public void Family_pages()
    {
        double[] p = [0.001, 0.02, 0.3, 0.2, 0.6, 0.012, 0.015, 0.04, 0.9];
        int[] familyOf = [0, 0, 0, 1, 1, 2, 2, 2, 2];
        var families = new Families(familyOf);
        ShowsFamilies("family-selection", p, familyOf, Adjusted((own, adjusted) => FamilySelection.Adjust(own, families, adjusted), p));
        var simes = Simes.OfEach(Probabilities(p), families);
        var selected = new Probability[3];
        BenjaminiHochberg.Adjust(simes, selected);
        for (int family = 0; family < 3; family++)
            MethodPage.Of("family-selection").Shows($"{family + 1}", $"{simes[family].Value}, {selected[family].Value}");
        MethodPage.Of("simes").Shows("p", $"{Simes.Global(Probabilities(Five)).Value}");
    }

    [Fact]
    public void E_value_page()
    {
        double[] e = [80, 40, 2, 0.5];
        var adjusted = new Probability[4];
        EBenjaminiHochberg.Adjust(Array.ConvertAll(e, Math.Log10), adjusted);
        for (int i = 0; i < e.Length; i++)
            MethodPage.Of("e-bh").Shows($"{e[i]}", $"{adjusted[i].Value}");
    }

    [Fact]
    public void True_discoveries_page()
    {
        double[] p = Expected.Table("bh1995_pvalues").Numbers("p");
        Array.Sort(p);
        var bounds = ClosedTesting.WithSimes(Probabilities(p), 0.05);
        var page = MethodPage.Of("true-discoveries");
        int[] top = bounds.TrueDiscoveriesInTop();
        foreach (int k in new[] { 1, 3, 4, 9, 15 })
            page.Shows($"top {k}", $"{(double)top[k - 1]}");
        page.Shows("ranks 4 to 9", $"{(double)bounds.TrueDiscoveriesAtLeast([3, 4, 5, 6, 7, 8])}");
    }

    [Fact]
    public void Interval_pages()
    {
        MethodPage.Of("false-coverage").Shows("confidence", $"{FalseCoverage.Confidence(4, 15, 0.05)}");
        MethodPage.Of("simultaneous-intervals").Shows("confidence of each", $"{SimultaneousLevel.Confidence(15, 0.95)}");
    }

    [Fact]
    public void Resampling_pages()
    {
        double[] differences = [.. Enumerable.Range(1, 5).SelectMany(j => Expected.Table("westfall_young_8x5").Numbers($"e{j}"))];
        var maxT = MaxT.Run(new DifferenceTable(differences, 8), new ResamplingOptions());
        var minP = MinP.Run(new DifferenceTable(differences, 8), new ResamplingOptions());
        for (int j = 0; j < 5; j++)
        {
            var alone = MinP.Run(new DifferenceTable(differences.AsMemory(j * 8, 8), 8), new ResamplingOptions());
            MethodPage.Of("max-t").Shows($"e{j + 1}", $"{maxT.StepDown[j].Value}, {maxT.SingleStep[j].Value}");
            MethodPage.Of("min-p").Shows($"e{j + 1}", $"{alone.StepDown[0].Value}, {minP.StepDown[j].Value}");
        }

        MethodPage.Of("max-t").Shows("critical t at 0.05", $"{maxT.CriticalValue}");
    }

    [Fact]
    public void Relabeling_page()
    {
        // The table of the page read as members of sets (1 to 4 with the case 4, 5 to 8 with the cases 6 and 8) and as subjects of two arms.
        var values = new DifferenceTable(Enumerable.Range(1, 5).SelectMany(j => Expected.Table("westfall_young_8x5").Numbers($"e{j}")).ToArray(), 8);
        var sets = RelabelMaxT.Run(values, new RelabelBlocks([0, 4, 8], [false, false, false, true, false, true, false, true]), new ResamplingOptions());
        var arms = RelabelMaxT.Run(values, new RelabelBlocks([0, 8], [true, true, false, true, false, true, false, false]), new ResamplingOptions());
        Assert.Equal((23, 69), (sets.Flips, arms.Flips));
        for (int j = 0; j < 5; j++)
        {
            MethodPage.Of("max-t").Shows($"e{j + 1} of the sets", $"{sets.StepDown[j].Value}, {sets.SingleStep[j].Value}");
            MethodPage.Of("max-t").Shows($"e{j + 1} of the arms", $"{arms.StepDown[j].Value}, {arms.SingleStep[j].Value}");
        }

        MethodPage.Of("max-t").Shows("critical score of the arms at 0.05", $"{arms.CriticalValue}");
    }

    private static void ShowsEach(string name, double[] p, Probability[] adjusted)
    {
        for (int i = 0; i < p.Length; i++)
            MethodPage.Of(name).Shows(FormattableString.Invariant($"{p[i]}"), $"{adjusted[i].Value}");
    }

    private static void ShowsWeighted(string name, Probability[] adjusted)
    {
        for (int i = 0; i < adjusted.Length; i++)
            MethodPage.Of(name).Shows(FormattableString.Invariant($"{Weighted[i]}, {Weights[i]}"), $"{adjusted[i].Value}");
    }

    private static void ShowsFamilies(string name, double[] p, int[] families, Probability[] adjusted)
    {
        for (int i = 0; i < p.Length; i++)
            MethodPage.Of(name).Shows(FormattableString.Invariant($"{families[i] + 1}, {p[i]}"), $"{adjusted[i].Value}");
    }

    private static Probability[] Adjusted(Adjustment procedure, double[] p)
    {
        var adjusted = new Probability[p.Length];
        procedure(Probabilities(p), adjusted);
        return adjusted;
    }

    private static Probability[] Probabilities(double[] p) => Array.ConvertAll(p, Probability.Of);
}
