using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>Hedges' factor J(df) = Γ(df/2) / (√(df/2) Γ((df−1)/2)), which takes the small-sample bias out of mean over sd.</summary>
/// <remarks>Source: Hedges (1981), Journal of Educational Statistics 6, 107-128; exact form, not 1 − 3/(4df − 1).</remarks>
internal static class HedgesCorrection
{
    /// <summary>J for these degrees of freedom, infinite ones too; NaN up to 1, where mean over sd has no expectation to correct.</summary>
    public static double Factor(double df) => df switch
    {
        <= 1 => double.NaN,
        double.PositiveInfinity => 1,
        _ => StirlingCorrection.HalfStepRatio((df - 1) / 2) * Math.Sqrt((df - 1) / df),
    };
}
