using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Multiplicity;
using MatchedSuite.Statistics.Multiplicity.Resampling;

namespace MatchedSuite.Engine.Methods;

/// <summary>The adjustments, one line each; a new one is one more line.</summary>
public static class AdjustmentTable
{
    private const ErrorRate FamilyWise = ErrorRate.FamilyWise;
    private const ErrorRate FalseDiscovery = ErrorRate.FalseDiscovery;

    /// <summary>Every adjustment.</summary>
    public static IReadOnlyList<Adjustment> All { get; } =
    [
        Plain("bonferroni", FamilyWise, Bonferroni.Adjust) with { FirstStep = FirstStep.EqualShares },
        Plain("sidak", FamilyWise, Sidak.Adjust) with { FirstStep = FirstStep.SidakShares },
        new PValueAdjustment("holm", FamilyWise, HolmByWeight) { FirstStep = FirstStep.WeightedShares },
        Plain("holm-sidak", FamilyWise, HolmSidak.Adjust) with { FirstStep = FirstStep.SidakShares },
        Plain("hochberg", FamilyWise, Hochberg.Adjust) with { FirstStep = FirstStep.EqualShares },
        Plain("hommel", FamilyWise, Hommel.Adjust) with { FirstStep = FirstStep.EqualShares },
        new ResamplingAdjustment("max-t", MaxT.Run) { OverLabels = RelabelMaxT.Run },
        new ResamplingAdjustment("min-p", MinP.Run),
        Plain("bh", FalseDiscovery, BenjaminiHochberg.Adjust) with
        {
            OverSelectedFamilies = (in Hypotheses of, Span<Probability> adjusted) => FamilySelection.Adjust(of.P, of.Families, adjusted),
        },
        Plain("by", FalseDiscovery, BenjaminiYekutieli.Adjust),
        Plain("two-stage-bh", FalseDiscovery, TwoStageBenjaminiHochberg.Adjust),
        Plain("storey-q", FalseDiscovery, StoreyQ.Adjust),
        new PValueAdjustment("weighted-bh", FalseDiscovery, (in Hypotheses of, Span<Probability> adjusted) =>
            WeightedBenjaminiHochberg.Adjust(of.P, of.Weights, adjusted)),
        Plain("fixed-sequence", FamilyWise, FixedSequence.Adjust) with { FirstStep = FirstStep.WholeLevel },
        new PValueAdjustment("gatekeeper-holm", FamilyWise, (in Hypotheses of, Span<Probability> adjusted) =>
            GatekeeperHolm.Adjust(of.P, of.Families, adjusted)) { FirstStep = FirstStep.SharesOfFamily, GoesFromFamilyToFamily = true },
    ];

    /// <summary>The adjustments that p-values alone suffice for.</summary>
    public static IReadOnlyList<PValueAdjustment> OverPValues { get; } = [.. All.OfType<PValueAdjustment>()];

    /// <summary>The adjustment of this name.</summary>
    /// <exception cref="KeyNotFoundException">There is none; the study reader has checked names before.</exception>
    public static Adjustment Named(string name) =>
        All.FirstOrDefault(adjustment => adjustment.Name == name)
        ?? throw new KeyNotFoundException($"There is no adjustment '{name}'.");

    private static PValueAdjustment Plain(string name, ErrorRate controls, Statistics.Multiplicity.Adjustment adjust) =>
        new(name, controls, (in Hypotheses of, Span<Probability> adjusted) => adjust(of.P, adjusted));

    private static void HolmByWeight(in Hypotheses hypotheses, Span<Probability> adjusted)
    {
        if (hypotheses.AreWeighted)
            Holm.Adjust(hypotheses.P, hypotheses.Weights, adjusted);
        else
            Holm.Adjust(hypotheses.P, adjusted);
    }
}
