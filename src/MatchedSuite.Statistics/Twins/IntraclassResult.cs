namespace MatchedSuite.Statistics.Twins;

/// <summary>What one endpoint's sets say about their members' likeness. Numbers are NaN unless <see cref="Outcome"/> is Tested.</summary>
/// <param name="Outcome">Whether the correlation could be computed.</param>
/// <param name="Sets">Complete sets.</param>
/// <param name="Estimate">ICC(1,1).</param>
/// <param name="Interval">Its exact interval.</param>
/// <param name="BetweenMeanSquare">Mean square between sets, squared endpoint unit.</param>
/// <param name="WithinMeanSquare">Mean square within sets, squared endpoint unit.</param>
/// <param name="F">Their ratio.</param>
/// <param name="DegreesOfFreedom">Degrees of freedom between sets.</param>
/// <param name="DenominatorDegreesOfFreedom">Degrees of freedom within sets.</param>
/// <param name="P">Probability of so large a ratio without any correlation.</param>
public readonly record struct IntraclassResult(
    Outcome Outcome, int Sets, double Estimate, Interval Interval, double BetweenMeanSquare, double WithinMeanSquare, double F,
    double DegreesOfFreedom, double DenominatorDegreesOfFreedom, Probability P)
{
    internal static IntraclassResult Untested(Outcome outcome, int sets) => new(
        outcome, sets, double.NaN, Interval.None, double.NaN, double.NaN, double.NaN, double.NaN, double.NaN, Probability.Missing);
}
