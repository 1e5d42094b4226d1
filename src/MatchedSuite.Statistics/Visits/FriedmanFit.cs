using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Visits;

/// <summary>What the ranks of one endpoint say about differences between visits. Numbers are NaN unless <see cref="Outcome"/> is Tested.</summary>
/// <param name="Outcome">Whether the statistic could be computed.</param>
/// <param name="Subjects">Complete subjects, n.</param>
/// <param name="Visits">Visits, k.</param>
/// <param name="HasTies">Some subject has equal values.</param>
/// <param name="ChiSquared">Friedman's statistic, corrected for ties.</param>
/// <param name="ExactP">Share of all rearrangements of the midranks within subjects that reach the statistic; missing unless the table is tiny.</param>
public readonly record struct FriedmanFit(
    Outcome Outcome, int Subjects, int Visits, bool HasTies, double ChiSquared, Probability ExactP)
{
    /// <summary>k − 1.</summary>
    public int DegreesOfFreedom => Visits - 1;

    /// <summary>Upper tail of χ².</summary>
    public Probability ChiSquaredP =>
        Outcome == Outcome.Tested ? Statistics.Distributions.ChiSquared.UpperTail(ChiSquared, DegreesOfFreedom) : Probability.Missing;

    /// <summary>Kendall's coefficient of concordance: 1 where all subjects rank the visits alike.</summary>
    public double KendallW => ChiSquared / (Subjects * (double)DegreesOfFreedom);

    /// <summary>Iman and Davenport's F on k − 1 and (n − 1)(k − 1) degrees of freedom; infinite where all subjects rank alike.</summary>
    public double ImanDavenportF => (Subjects - 1) * ChiSquared / (Subjects * (double)DegreesOfFreedom - ChiSquared);

    /// <summary>Upper tail of that F.</summary>
    public Probability ImanDavenportP => Outcome == Outcome.Tested
        ? FisherF.UpperTail(ImanDavenportF, DegreesOfFreedom, (Subjects - 1) * DegreesOfFreedom)
        : Probability.Missing;
}
