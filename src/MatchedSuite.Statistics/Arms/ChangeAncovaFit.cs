namespace MatchedSuite.Statistics.Arms;

/// <summary>Least squares of follow-up on baseline and arm. Numbers are NaN unless <see cref="Outcome"/> is Tested.</summary>
/// <param name="Outcome">Whether the model could be fitted.</param>
/// <param name="Subjects">Subjects of both arms.</param>
/// <param name="ArmEffect">Index minus reference at equal baseline, endpoint unit.</param>
/// <param name="ArmError">Its standard error.</param>
/// <param name="BaselineSlope">Follow-up per unit of baseline within arms.</param>
/// <param name="BaselineError">Its standard error.</param>
/// <param name="Intercept">Expected follow-up of the reference arm at baseline 0.</param>
/// <param name="ResidualDeviation">Standard deviation about the two parallel lines.</param>
public readonly record struct ChangeAncovaFit(
    Outcome Outcome, int Subjects, double ArmEffect, double ArmError, double BaselineSlope, double BaselineError,
    double Intercept, double ResidualDeviation)
{
    /// <summary>n − 3.</summary>
    public int DegreesOfFreedom => Subjects - 3;
}
