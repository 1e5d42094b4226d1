using MathNet.Numerics.LinearAlgebra;

namespace MatchedSuite.Statistics.Multiplicity;

/// <summary>The cubic smoothing spline with three degrees of freedom on nineteen equally spaced points, as weights on their ordinates.</summary>
/// <remarks>
/// A smoothing spline is linear in the data: fit = (I + a·K)⁻¹·y with K = Q·R⁻¹·Qᵀ, and its degrees of freedom are the trace.
/// The points never change, so one row of that matrix is all the estimate of π0 needs (Green and Silverman 1994, section 2.3).
/// </remarks>
internal static class SmoothingWeights
{
    private const int Points = 19;
    private const double DegreesOfFreedom = 3;

    private static readonly double[] LastRow = Compute();

    /// <summary>Weight of each ordinate in the fitted value at the last point.</summary>
    public static ReadOnlySpan<double> AtLastPoint => LastRow;

    private static double[] Compute()
    {
        var spectrum = Roughness().Evd(Symmetricity.Symmetric);
        double[] roughness = [.. spectrum.EigenValues.Select(value => Math.Max(0, value.Real))];
        double amount = AmountFor(roughness);
        var row = new double[Points];
        for (int point = 0; point < Points; point++)
        {
            for (int k = 0; k < Points; k++)
                row[point] += spectrum.EigenVectors[Points - 1, k] * spectrum.EigenVectors[point, k] / (1 + amount * roughness[k]);
        }

        return row;
    }

    // The spacing of the points is taken as 1; it only rescales the amount of smoothing.
    private static Matrix<double> Roughness()
    {
        var second = Matrix<double>.Build.Dense(Points, Points - 2);
        var gram = Matrix<double>.Build.Dense(Points - 2, Points - 2);
        for (int k = 0; k < Points - 2; k++)
        {
            (second[k, k], second[k + 1, k], second[k + 2, k]) = (1, -2, 1);
            gram[k, k] = 2.0 / 3;
            if (k > 0)
                gram[k - 1, k] = gram[k, k - 1] = 1.0 / 6;
        }

        var roughness = second * gram.Solve(second.Transpose());
        return (roughness + roughness.Transpose()) / 2;
    }

    // The trace falls from 19 to 2 as the amount grows; bisection on its logarithm to the last bit.
    private static double AmountFor(double[] roughness)
    {
        double low = -30;
        double high = 30;
        for (int step = 0; step < 80; step++)
        {
            double middle = (low + high) / 2;
            double trace = roughness.Sum(value => 1 / (1 + Math.Exp(middle) * value));
            if (trace > DegreesOfFreedom)
                low = middle;
            else
                high = middle;
        }

        return Math.Exp(low);
    }
}
