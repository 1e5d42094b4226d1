using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Reference.Tests;

/// <summary>
/// Paired-t, signed-rank (both treatments of zeros), sign and sign-flip test on eleven published or invented data sets. The expected numbers come from base R 4.2.2 and
/// from exact fractions with mpmath at 50 digits (Inputs/README.md, "Definitions"); d is the first column minus the second.
/// </summary>
public class PairedDifferencesTests
{
    private static readonly (string Dataset, string File, string Index, string Reference, string Treatment)[] Sources =
    [
        ("sleep", "sleep", "drug1", "drug2", ""),
        ("darwin_maize", "darwin_maize", "cross", "self", ""),
        ("hw_depression", "hw_depression", "before", "after", ""),
        ("shoes", "shoes", "A", "B", ""),
        ("immer", "immer", "y1931", "y1932", ""),
        ("twins_hippocampus", "twins_hippocampus", "unaffected", "affected", ""),
        ("zeros_ties", "zeros_ties", "a", "b", ""),
        ("lead_blood", "lead_blood", "exposed", "control", ""),
        ("anorexia_CBT", "anorexia", "after", "before", "CBT"),
        ("anorexia_Cont", "anorexia", "after", "before", "Cont"),
        ("anorexia_FT", "anorexia", "after", "before", "FT"),
    ];

    // The other convention of the same quantity, listed in the reference for comparison.
    private static readonly string[] OtherConventions = ["hedges_J_approx", "hedges_gz_approx"];

    private delegate double Measure(in PairSample pairs, Scratch scratch);

    [Theory]
    [InlineData("paired_t", 11 * 15)]
    [InlineData("signed_rank.drop_zeros.exact", 11 * 8)]
    [InlineData("signed_rank.drop_zeros.normal.corrected", 11 * 9)]
    [InlineData("signed_rank.pratt.exact", 11 * 6)]
    [InlineData("signed_rank.pratt.normal.corrected", 11 * 8)]
    [InlineData("signflip_mean.exact", 6 * 8)]
    [InlineData("hodges_lehmann", 11 * 6)]
    [InlineData("sign_test", 11 * 9)]
    public void Every_quantity_of_every_paired_data_set_agrees(string @case, int quantities)
    {
        var table = ReferenceTable.Read("expected.csv");
        var (datasets, cases, names) = (table.Texts("dataset"), table.Texts("case"), table.Texts("quantity"));
        int compared = 0;
        for (int row = 0; row < table.Rows; row++)
        {
            if (cases[row] != @case || OtherConventions.Contains(names[row]))
                continue;
            Expected.Check(Measured(datasets[row], @case, names[row]), datasets[row], @case, names[row]);
            compared++;
        }

        Assert.Equal(quantities, compared);
    }

    private static double Measured(string dataset, string @case, string quantity)
    {
        var source = Sources.Single(known => known.Dataset == dataset);
        var table = Expected.Table(source.File);
        double[] Column(string name) =>
            source.Treatment.Length == 0 ? table.Numbers(name) : table.Numbers(name, "treatment", source.Treatment);
        var scratch = new Scratch();
        using var frame = scratch.Open();
        return Measures(@case)[quantity](PairSample.Of(Column(source.Index), Column(source.Reference), frame), scratch);
    }

    private static Dictionary<string, Measure> Measures(string @case) => @case switch
    {
        "paired_t" => PairedTMeasures,
        "signed_rank.drop_zeros.exact" => SignedRankMeasures,
        "signed_rank.drop_zeros.normal.corrected" => SignedRankNormalMeasures,
        "signed_rank.pratt.exact" => PrattMeasures,
        "signed_rank.pratt.normal.corrected" => PrattNormalMeasures,
        "signflip_mean.exact" => SignFlipMeasures,
        "hodges_lehmann" => HodgesLehmannMeasures,
        _ => SignMeasures,
    };

    private static TestOptions For(Sides sides) => new() { Sides = sides };

    private static readonly Dictionary<string, Measure> PairedTMeasures = new()
    {
        ["n"] = (in p, s) => PairedT.Run(p, TestOptions.Default, s).Sets,
        ["mean_diff"] = (in p, s) => PairedT.Run(p, TestOptions.Default, s).Estimate,
        ["sd_diff"] = (in p, s) => PairedT.Run(p, TestOptions.Default, s).StandardError * Math.Sqrt(p.Count),
        ["se"] = (in p, s) => PairedT.Run(p, TestOptions.Default, s).StandardError,
        ["t"] = (in p, s) => PairedT.Run(p, TestOptions.Default, s).Statistic,
        ["df"] = (in p, s) => PairedT.Run(p, TestOptions.Default, s).DegreesOfFreedom,
        ["p_two"] = (in p, s) => PairedT.Run(p, TestOptions.Default, s).P.Value,
        ["log10_p_two"] = (in p, s) => PairedT.Run(p, TestOptions.Default, s).P.Log10,
        ["p_greater"] = (in p, s) => PairedT.Run(p, For(Sides.Greater), s).P.Value,
        ["p_less"] = (in p, s) => PairedT.Run(p, For(Sides.Less), s).P.Value,
        ["ci95_lo"] = (in p, s) => PairedT.Run(p, TestOptions.Default, s).Interval.Low,
        ["ci95_hi"] = (in p, s) => PairedT.Run(p, TestOptions.Default, s).Interval.High,
        ["dz"] = (in p, s) => PairedT.Run(p, TestOptions.Default, s).EffectSize / HedgesCorrection.Factor(p.Count - 1),
        ["hedges_J"] = (in p, s) => HedgesCorrection.Factor(p.Count - 1),
        ["hedges_gz"] = (in p, s) => PairedT.Run(p, TestOptions.Default, s).EffectSize,
    };

    private static readonly Dictionary<string, Measure> SignedRankMeasures = new()
    {
        ["n"] = (in p, s) => SignedRank.Run(p, TestOptions.Default, s).Sets,
        ["n_zero"] = (in p, s) => Ranks(p, s).Zeros,
        ["n_used"] = (in p, s) => Ranks(p, s).Ranked,
        ["W_plus"] = (in p, s) => SignedRank.Run(p, TestOptions.Default, s).Statistic,
        ["W_minus"] = (in p, s) => Ranks(p, s).Largest - SignedRank.Run(p, TestOptions.Default, s).Statistic,
        ["p_two"] = (in p, s) => SignedRank.Run(p, TestOptions.Default, s).P.Value,
        ["p_greater"] = (in p, s) => SignedRank.Run(p, For(Sides.Greater), s).P.Value,
        ["p_less"] = (in p, s) => SignedRank.Run(p, For(Sides.Less), s).P.Value,
    };

    private static readonly Dictionary<string, Measure> SignedRankNormalMeasures = new()
    {
        ["n"] = (in p, s) => p.Count,
        ["n_zero"] = (in p, s) => Ranks(p, s).Zeros,
        ["n_used"] = (in p, s) => Ranks(p, s).Ranked,
        ["W_plus"] = (in p, s) => Ranks(p, s).Sum,
        ["W_minus"] = (in p, s) => Ranks(p, s).Largest - Ranks(p, s).Sum,
        ["p_two"] = (in p, s) => NormalP(p, s, Sides.Two).Value,
        ["p_greater"] = (in p, s) => NormalP(p, s, Sides.Greater).Value,
        ["p_less"] = (in p, s) => NormalP(p, s, Sides.Less).Value,
        // The corrected z is the normal quantile of the two-sided p, with the sign of the excess.
        ["z_two"] = (in p, s) => Math.CopySign(
            StandardNormal.UpperQuantile(NormalP(p, s, Sides.Two).Times(0.5)), (2 * Ranks(p, s).Sum) - Ranks(p, s).Largest),
    };

    private static readonly Dictionary<string, Measure> HodgesLehmannMeasures = new()
    {
        ["n"] = (in p, s) => SignedRank.Run(p, TestOptions.Default, s).Sets,
        ["n_walsh"] = (in p, s) => SignedRankNull.Of(p.Count).LargestSum,
        ["estimate"] = (in p, s) => SignedRank.Run(p, TestOptions.Default, s).Estimate,
        ["ci95_lo"] = (in p, s) => SignedRank.Run(p, TestOptions.Default, s).Interval.Low,
        ["ci95_hi"] = (in p, s) => SignedRank.Run(p, TestOptions.Default, s).Interval.High,
        ["achieved_level"] = (in p, s) =>
        {
            var untied = SignedRankNull.Of(p.Count);
            return 1 - (2 * untied.AtMost(untied.LowerQuantile(TestOptions.Default.TailShare) - 1).Value);
        },
    };

    private static readonly Dictionary<string, Measure> PrattMeasures = new()
    {
        ["n"] = (in p, s) => SignedRankPratt.Run(p, TestOptions.Default, s).Sets,
        ["n_zero"] = (in p, s) => Ranks(p, s).Zeros,
        ["W_plus"] = (in p, s) => SignedRankPratt.Run(p, TestOptions.Default, s).Statistic,
        ["p_two"] = (in p, s) => SignedRankPratt.Run(p, TestOptions.Default, s).P.Value,
        ["p_greater"] = (in p, s) => SignedRankPratt.Run(p, For(Sides.Greater), s).P.Value,
        ["p_less"] = (in p, s) => SignedRankPratt.Run(p, For(Sides.Less), s).P.Value,
    };

    private static readonly Dictionary<string, Measure> PrattNormalMeasures = new()
    {
        ["n"] = (in p, s) => p.Count,
        ["n_zero"] = (in p, s) => Ranks(p, s).Zeros,
        ["W_plus"] = (in p, s) => PrattSum(p, s),
        ["W_minus"] = (in p, s) => PrattTotal(p, s) - PrattSum(p, s),
        ["p_two"] = (in p, s) => PrattNormalP(p, s, Sides.Two).Value,
        ["p_greater"] = (in p, s) => PrattNormalP(p, s, Sides.Greater).Value,
        ["p_less"] = (in p, s) => PrattNormalP(p, s, Sides.Less).Value,
        ["z_two"] = (in p, s) => Math.CopySign(
            StandardNormal.UpperQuantile(PrattNormalP(p, s, Sides.Two).Times(0.5)), (2 * PrattSum(p, s)) - PrattTotal(p, s)),
    };

    private static readonly Dictionary<string, Measure> SignFlipMeasures = new()
    {
        ["n"] = (in p, s) => SignFlipMean.Run(p, TestOptions.Default, s).Sets,
        ["n_flips"] = (in p, s) => 1L << p.Count,
        ["count_greater"] = (in p, s) => SignFlipMean.Run(p, For(Sides.Greater), s).P.Value * (1L << p.Count),
        ["count_less"] = (in p, s) => SignFlipMean.Run(p, For(Sides.Less), s).P.Value * (1L << p.Count),
        ["count_two"] = (in p, s) => SignFlipMean.Run(p, TestOptions.Default, s).P.Value * (1L << p.Count),
        ["p_two"] = (in p, s) => SignFlipMean.Run(p, TestOptions.Default, s).P.Value,
        ["p_greater"] = (in p, s) => SignFlipMean.Run(p, For(Sides.Greater), s).P.Value,
        ["p_less"] = (in p, s) => SignFlipMean.Run(p, For(Sides.Less), s).P.Value,
    };

    private static readonly Dictionary<string, Measure> SignMeasures = new()
    {
        ["n_pos"] = (in p, s) => SignTest.Run(p, TestOptions.Default, s).Statistic,
        ["n_neg"] = (in p, s) => Ranks(p, s).Ranked - SignTest.Run(p, TestOptions.Default, s).Statistic,
        ["n_zero"] = (in p, s) => Ranks(p, s).Zeros,
        ["p_two"] = (in p, s) => SignTest.Run(p, TestOptions.Default, s).P.Value,
        ["p_greater"] = (in p, s) => SignTest.Run(p, For(Sides.Greater), s).P.Value,
        ["p_less"] = (in p, s) => SignTest.Run(p, For(Sides.Less), s).P.Value,
        ["prop_pos"] = (in p, s) => (1 + SignTest.Run(p, TestOptions.Default, s).EffectSize) / 2,
        ["cp95_lo"] = (in p, s) => PositiveShare(p, s).Low,
        ["cp95_hi"] = (in p, s) => PositiveShare(p, s).High,
    };

    private static (int Zeros, int Ranked, double Sum, double Largest, double TieTerm) Ranks(in PairSample pairs, Scratch scratch)
    {
        using var frame = scratch.Open();
        var ranks = SignedRanks.Of(pairs, frame);
        return (ranks.Zeros, ranks.Ranked, 0.5 * ranks.DoubledPositiveSum, ranks.Ranked * (ranks.Ranked + 1) / 2.0, ranks.TieTerm);
    }

    private static Probability NormalP(in PairSample pairs, Scratch scratch, Sides sides)
    {
        var ranks = Ranks(pairs, scratch);
        var (lower, upper) = SignedRankNormal.Tails(ranks.Sum, ranks.Ranked, 0, ranks.TieTerm);
        return Tails.ForSides(sides, lower, upper);
    }

    private static double PrattSum(in PairSample pairs, Scratch scratch) =>
        SignedRankPratt.Run(pairs, TestOptions.Default, scratch).Statistic;

    private static double PrattTotal(in PairSample pairs, Scratch scratch)
    {
        double n = pairs.Count, zeros = Ranks(pairs, scratch).Zeros;
        return ((n * (n + 1)) - (zeros * (zeros + 1))) / 2;
    }

    private static Probability PrattNormalP(in PairSample pairs, Scratch scratch, Sides sides)
    {
        var ranks = Ranks(pairs, scratch);
        var (lower, upper) = SignedRankNormal.Tails(PrattSum(pairs, scratch), pairs.Count, ranks.Zeros, ranks.TieTerm);
        return Tails.ForSides(sides, lower, upper);
    }

    private static Interval PositiveShare(in PairSample pairs, Scratch scratch) =>
        Binomial.ExactLimits((long)SignTest.Run(pairs, TestOptions.Default, scratch).Statistic, Ranks(pairs, scratch).Ranked, 0.025);
}
