using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Visits;

/// <summary>What the ranks of one endpoint say about a rise in the order of the visits. Numbers are NaN unless <see cref="Outcome"/> is Tested.</summary>
/// <param name="Outcome">Whether the statistic could be computed.</param>
/// <param name="Subjects">Complete subjects, n.</param>
/// <param name="Visits">Visits, k.</param>
/// <param name="HasTies">Some subject has equal values.</param>
/// <param name="L">Page's L: Σ over visits j = 1 … k of j times the rank sum of visit j.</param>
/// <param name="StandardDeviation">Of L over all rearrangements of the observed midranks within subjects.</param>
/// <param name="ExactLower">Share of those rearrangements with at most this L; missing where there are too many to follow.</param>
/// <param name="ExactUpper">Share with at least this L.</param>
public readonly record struct PageTrendFit(
    Outcome Outcome, int Subjects, int Visits, bool HasTies, double L, double StandardDeviation,
    Probability ExactLower, Probability ExactUpper)
{
    /// <summary>Mean of L where the visits don't matter.</summary>
    public double Mean => Subjects * (double)Visits * (Visits + 1) * (Visits + 1) / 4;

    /// <summary>Standardised L.</summary>
    public double Z => (L - Mean) / StandardDeviation;

    /// <summary>Normal probability of at most this L.</summary>
    public Probability NormalLower => Outcome == Outcome.Tested ? StandardNormal.LowerTail(Z) : Probability.Missing;

    /// <summary>Normal probability of at least this L.</summary>
    public Probability NormalUpper => Outcome == Outcome.Tested ? StandardNormal.UpperTail(Z) : Probability.Missing;

    /// <summary>Mean of the subjects' Spearman correlations with the order of the visits (ties counted as zero); from −1 to 1.</summary>
    public double MeanSpearman => 12 * (L - Mean) / (Subjects * (double)Visits * ((double)Visits * Visits - 1));
}
