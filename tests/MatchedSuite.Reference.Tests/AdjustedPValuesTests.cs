using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Multiplicity;

namespace MatchedSuite.Reference.Tests;

/// <summary>
/// Adjusted p-values of Benjamini and Hochberg (1995), J R Stat Soc B 57, 289-300 (fifteen p-values of their example), of
/// p-vectors with ties, extremes and missing entries, and of a weighted family: exact definitions in rational arithmetic, base R
/// p.adjust and statsmodels multipletests (Inputs/README.md).
/// </summary>
public class AdjustedPValuesTests
{
    private static readonly Dictionary<string, double[]> Vectors = new()
    {
        ["bh1995_pvalues"] = Expected.Table("bh1995_pvalues").Numbers("p"),
        ["pvector_ties_extremes"] = [0.01, 0.01, 0.02, 0.02, 0.02, 0.5, 1, 0, 1e-300, 0.049999999999999996, 0.05],
        ["pvector_single"] = [0.03],
        ["pvector_hommel7"] = [0.01, 0.02, 0.022, 0.09, 0.1, 0.11, 0.6],
        ["pvector_five"] = [0.005, 0.011, 0.02, 0.04, 0.13],
        ["pvector_tiny"] = [1e-320, 5e-324, 1e-310, 1e-200, 0.9],
        ["pvector_with_missing"] = [0.01, double.NaN, 0.03, 0.04, double.NaN, 0.2],
    };

    private static readonly Dictionary<string, Adjustment> Procedures = new()
    {
        ["bonferroni"] = Bonferroni.Adjust,
        ["sidak"] = Sidak.Adjust,
        ["holm"] = Holm.Adjust,
        ["holm_sidak"] = HolmSidak.Adjust,
        ["hochberg"] = Hochberg.Adjust,
        ["hommel"] = Hommel.Adjust,
        ["BH"] = BenjaminiHochberg.Adjust,
        ["BY"] = BenjaminiYekutieli.Adjust,
    };

    [Fact]
    public void Every_adjusted_p_value_of_every_p_vector_agrees_in_value_and_in_logarithm()
    {
        int compared = 0;
        foreach (var (dataset, vector) in Vectors)
        {
            foreach (var (name, procedure) in Procedures)
            {
                var adjusted = Adjusted(procedure, vector);
                for (int i = 0; i < vector.Length; i++)
                {
                    if (!Expected.Has(dataset, "adjust." + name, $"adj.{i + 1}"))
                        continue;
                    CheckBoth(adjusted[i], dataset, "adjust." + name, $"adj.{i + 1}");
                    compared++;
                }
            }
        }

        // 44 tested p-values under 8 procedures, and 4 beside missing ones under the 6 that base R offers.
        Assert.Equal(44 * 8 + 4 * 6, compared);
    }

    [Fact]
    public void Missing_p_values_stay_missing_under_every_procedure()
    {
        foreach (var procedure in Procedures.Values)
        {
            var adjusted = Adjusted(procedure, Vectors["pvector_with_missing"]);
            Assert.Equal([false, true, false, false, true, false], Array.ConvertAll(adjusted, one => one.IsMissing));
        }
    }

    [Fact]
    public void The_global_p_value_of_Simes_agrees_for_every_p_vector()
    {
        int compared = 0;
        foreach (var (dataset, vector) in Vectors)
        {
            if (dataset == "pvector_with_missing")
                continue;
            CheckBoth(Simes.Global(Probabilities(vector)), dataset, "adjust.simes", "p");
            compared++;
        }

        Assert.Equal(6, compared);
    }

    [Theory]
    [InlineData("bonferroni")]
    [InlineData("holm")]
    [InlineData("hochberg")]
    [InlineData("hommel")]
    [InlineData("BH")]
    [InlineData("BY")]
    public void The_example_of_Benjamini_and_Hochberg_has_as_many_rejections_as_published(string name)
    {
        var adjusted = Adjusted(Procedures[name], Vectors["bh1995_pvalues"]);
        Expected.Check(adjusted.Count(one => one.IsAtMost(0.05)), "bh1995_pvalues", "adjust.rejections_at_0.05", name);
    }

    [Theory]
    [InlineData("bh1995_pvalues")]
    [InlineData("pvector_hommel7")]
    public void Two_stage_step_up_at_one_level_gives_the_adjusted_p_values_and_rejections_of_definition_6(string dataset)
    {
        const string Case = "adjust.BKY_two_stage";
        const double Level = 0.05;
        var p = Probabilities(Vectors[dataset]);
        var atLevel = new Probability[p.Length];
        TwoStageBenjaminiHochberg.Adjust(p, Level, atLevel);
        var anyLevel = Adjusted(TwoStageBenjaminiHochberg.Adjust, Vectors[dataset]);
        for (int i = 0; i < p.Length; i++)
        {
            Expected.Check(atLevel[i].Value, dataset, Case, $"adj_statsmodels.{i + 1}");
            Expected.Check(atLevel[i].IsAtMost(Level) ? 1 : 0, dataset, Case, $"rejected.{i + 1}");
            Expected.Check(anyLevel[i].IsAtMost(Level) ? 1 : 0, dataset, Case, $"rejected.{i + 1}");
        }

        var first = Adjusted(BenjaminiHochberg.Adjust, Vectors[dataset]);
        int rejected = first.Count(one => one.IsAtMost(Level / (1 + Level)));
        Expected.Check(rejected, dataset, Case, "stage1_rejections");
        Expected.Check(p.Length - rejected, dataset, Case, "m0_hat");
        Expected.Check(atLevel.Count(one => one.IsAtMost(Level)), dataset, Case, "stage2_rejections");
    }

    [Fact]
    public void Weighted_Holm_and_weighted_step_up_agree_with_closed_testing_and_with_the_formula()
    {
        const string Dataset = "weighted_pvalues";
        double[] values = [.. Enumerable.Range(1, 6).Select(i => Expected.Value(Dataset, "inputs", $"p.{i}"))];
        double[] weights = [.. Enumerable.Range(1, 6).Select(i => Expected.Value(Dataset, "inputs", $"w.{i}"))];
        var holm = new Probability[6];
        var stepUp = new Probability[6];
        Holm.Adjust(Probabilities(values), weights, holm);
        WeightedBenjaminiHochberg.Adjust(Probabilities(values), weights, stepUp);
        for (int i = 0; i < 6; i++)
        {
            CheckBoth(holm[i], Dataset, "adjust.weighted_holm", $"adj.{i + 1}");
            CheckBoth(stepUp[i], Dataset, "adjust.weighted_BH", $"adj.{i + 1}");
        }
    }

    private static Probability[] Adjusted(Adjustment procedure, double[] vector)
    {
        var adjusted = new Probability[vector.Length];
        procedure(Probabilities(vector), adjusted);
        return adjusted;
    }

    private static Probability[] Probabilities(double[] vector) => Array.ConvertAll(vector, Probability.Of);

    // A product of a number below the normal range has lost digits before it reaches us; its logarithm has not. An entry of
    // exactly 0 is compared absolutely: Šidák's tiny ones ran out of the fifty digits of their source.
    private static void CheckBoth(Probability actual, string dataset, string @case, string quantity)
    {
        double expected = Expected.Value(dataset, @case, quantity);
        if (expected is 0 or >= 1e-300)
            Expected.Check(actual.Value, dataset, @case, quantity);
        string text = Expected.Text(dataset, @case, quantity);
        if (text != "0.0")
            Assert.Equal(Log10(text), actual.Log10, 1e-9);
    }

    private static double Log10(string number)
    {
        int at = number.IndexOf('e', StringComparison.OrdinalIgnoreCase);
        return at < 0
            ? Math.Log10(ReferenceTable.Number(number))
            : Math.Log10(ReferenceTable.Number(number[..at])) + ReferenceTable.Number(number[(at + 1)..]);
    }
}
