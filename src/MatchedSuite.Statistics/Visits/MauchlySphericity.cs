using MatchedSuite.Statistics.LinearAlgebra;

namespace MatchedSuite.Statistics.Visits;

/// <summary>Mauchly's test that all differences between visits have the same variance.</summary>
/// <remarks>
/// W = |S| / (tr S/p)^p of the covariance S of p = k − 1 orthonormal contrasts over n subjects; with ν = n − 1 and
/// ρ = 1 − (2p² + p + 2)/(6pν), z = −νρ ln W is χ² with p(p + 1)/2 − 1 degrees of freedom up to a second-order term.
/// Sources: Mauchly (1940), Annals of Mathematical Statistics 11, 204-209; second-order term after Anderson (2003),
/// An Introduction to Multivariate Statistical Analysis, 10.7.4.
/// </remarks>
/// <param name="W">1 where sphericity holds exactly, 0 where the contrasts are dependent; NaN for fewer than 2 contrasts.</param>
/// <param name="ChiSquared">z; NaN where there is no test.</param>
/// <param name="DegreesOfFreedom">p(p + 1)/2 − 1.</param>
/// <param name="FirstOrderP">χ² tail of z alone.</param>
/// <param name="P">With the second-order term.</param>
public readonly record struct MauchlySphericity(
    double W, double ChiSquared, double DegreesOfFreedom, Probability FirstOrderP, Probability P)
{
    /// <summary>No test: two visits are always spherical, and too few subjects say nothing about it.</summary>
    public static MauchlySphericity None { get; } =
        new(double.NaN, double.NaN, double.NaN, Probability.Missing, Probability.Missing);

    /// <summary>Tests the covariance of orthonormal contrasts.</summary>
    /// <param name="covariance">Packed, <paramref name="contrasts"/> rows, not zero.</param>
    /// <param name="contrasts">p.</param>
    /// <param name="subjects">n.</param>
    /// <param name="scratch">Working memory.</param>
    internal static MauchlySphericity Of(ReadOnlySpan<double> covariance, int contrasts, int subjects, Scratch scratch)
    {
        if (contrasts < 2 || subjects <= contrasts)
            return None;
        using var frame = scratch.Open();
        Span<double> smallestPivots = frame.Doubles(contrasts), factor = frame.Doubles(PackedSymmetric.Length(contrasts));
        smallestPivots.Clear();
        int rank = Cholesky.Factor(covariance, contrasts, smallestPivots, factor);
        if (rank < contrasts)
            return None with { W = 0 };

        double p = contrasts, degrees = subjects - 1, trace = 0;
        for (int a = 0; a < contrasts; a++)
            trace += covariance[PackedSymmetric.At(a, a)];
        double logarithm = Math.Min(0, Cholesky.LogDeterminant(factor, contrasts) - p * Math.Log(trace / p));
        double rho = 1 - (2 * p * p + p + 2) / (6 * p * degrees);
        double z = -degrees * rho * logarithm, df = p * (p + 1) / 2 - 1;
        double second = (p + 2) * (p - 1) * (p - 2) * (2 * p * p * p + 6 * p * p + 3 * p + 2)
            / (288 * p * p * degrees * degrees * rho * rho);
        var first = Distributions.ChiSquared.UpperTail(z, df);
        var further = Distributions.ChiSquared.UpperTail(z, df + 4);
        return new MauchlySphericity(Math.Exp(logarithm), z, df, first, Mix(first, further, second));
    }

    // (1 − w)·first + w·further, kept a probability: the term is an expansion and may leave [0, 1] for tiny samples.
    private static Probability Mix(Probability first, Probability further, double weight)
    {
        double ratio = Math.Pow(10, further.Log10 - first.Log10);
        double factor = 1 + weight * (ratio - 1);
        return factor > 0 ? first.Times(factor) : Probability.Zero;
    }
}
