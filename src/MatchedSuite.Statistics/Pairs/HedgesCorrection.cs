using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>Hedges' factor J(df) = Γ(df/2) / (√(df/2) Γ((df−1)/2)), which takes the small-sample bias out of mean over sd.</summary>
/// <remarks>Source: Hedges (1981), Journal of Educational Statistics 6, 107-128; exact form, not 1 − 3/(4df − 1).</remarks>
internal static class HedgesCorrection
{
    /// <summary>J for a whole number of degrees of freedom; NaN at 1, where mean over sd has no expectation to correct.</summary>
    public static double Factor(int df) =>
        df < 2 ? double.NaN : StirlingCorrection.HalfStepRatio((df - 1) / 2.0) * Math.Sqrt((df - 1.0) / df);
}
