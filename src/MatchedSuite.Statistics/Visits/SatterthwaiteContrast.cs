using MatchedSuite.Statistics.LinearAlgebra;

namespace MatchedSuite.Statistics.Visits;

/// <summary>The variance of one combination w'β of fixed effects, and the degrees of freedom that variance is worth.</summary>
/// <remarks>
/// With f the variance of w'β as a function of the variance within σ² and the ratio λ, the degrees of freedom are
/// 2f²/(g'Ωg), g its gradient and Ω the inverse of the observed information, both analytic. Where the variance between
/// subjects is at its bound 0 only σ² is uncertain, and they are N − p.
/// Source: Satterthwaite (1946), Biometrics Bulletin 2, 110-114; Giesbrecht &amp; Burns (1985), Biometrics 41, 477-486.
/// </remarks>
/// <param name="Variance">Estimated variance of the combination, in squared units of the moments' scale.</param>
/// <param name="DegreesOfFreedom">Degrees of freedom, positive.</param>
internal readonly record struct SatterthwaiteContrast(double Variance, double DegreesOfFreedom)
{
    /// <summary>Works the combination out.</summary>
    /// <param name="fit">A tested fit.</param>
    /// <param name="weights">One weight a coded column of the fit.</param>
    /// <param name="turned">Room for as many numbers.</param>
    public static SatterthwaiteContrast Of(in MixedModelFit fit, ReadOnlySpan<double> weights, Span<double> turned)
    {
        int order = weights.Length;
        PackedSymmetric.Multiply(fit.Inverse, weights, order, turned);
        double unit = 0;
        for (int i = 0; i < order; i++)
            unit += weights[i] * turned[i];
        double variance = fit.ScaledWithin * unit;
        double byRatio = -fit.ScaledWithin * PackedSymmetric.QuadraticForm(fit.CrossProductsSlope, turned, order);
        double spread = unit * unit * fit.VarianceOfWithin
            + 2 * unit * byRatio * fit.CovarianceOfBoth
            + byRatio * byRatio * fit.VarianceOfRatio;
        return new SatterthwaiteContrast(variance, 2 * variance * variance / spread);
    }
}
