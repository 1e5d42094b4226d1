namespace MatchedSuite.Statistics.LinearAlgebra;

/// <summary>Eigenvalues and eigenvectors of a small packed symmetric matrix by Jacobi's rotations.</summary>
/// <remarks>Source: Jacobi (1846), Journal für die reine und angewandte Mathematik 30, 51-94; cyclic order.</remarks>
internal static class JacobiEigen
{
    // Convergence is quadratic; matrices of 50 rows need about 8 sweeps.
    private const int MostSweeps = 60;
    private const double OffDiagonalRatio = 1e-15;

    /// <summary>Turns <paramref name="matrix"/> into a diagonal of its eigenvalues.</summary>
    /// <param name="matrix">Packed, <paramref name="order"/> rows; its diagonal holds the eigenvalues afterwards, in no order.</param>
    /// <param name="order">Rows.</param>
    /// <param name="vectors">Room for order × order numbers; row i becomes the unit eigenvector of diagonal element i.</param>
    public static void Decompose(Span<double> matrix, int order, Span<double> vectors)
    {
        vectors[..(order * order)].Clear();
        for (int i = 0; i < order; i++)
            vectors[i * order + i] = 1;
        for (int sweep = 0; sweep < MostSweeps; sweep++)
        {
            bool turned = false;
            for (int upper = 0; upper < order - 1; upper++)
            {
                for (int lower = upper + 1; lower < order; lower++)
                    turned |= Rotate(matrix, order, vectors, upper, lower);
            }

            if (!turned)
                return;
        }
    }

    private static bool Rotate(Span<double> matrix, int order, Span<double> vectors, int p, int q)
    {
        double between = matrix[PackedSymmetric.At(q, p)];
        double first = matrix[PackedSymmetric.At(p, p)], second = matrix[PackedSymmetric.At(q, q)];
        if (Math.Abs(between) <= OffDiagonalRatio * Math.Sqrt(Math.Abs(first * second)) || between == 0)
            return false;
        double slope = (second - first) / (2 * between);
        double tangent = Math.CopySign(1, slope) / (Math.Abs(slope) + Math.Sqrt(slope * slope + 1));
        double cosine = 1 / Math.Sqrt(tangent * tangent + 1), sine = tangent * cosine;
        matrix[PackedSymmetric.At(p, p)] = first - tangent * between;
        matrix[PackedSymmetric.At(q, q)] = second + tangent * between;
        matrix[PackedSymmetric.At(q, p)] = 0;
        for (int i = 0; i < order; i++)
        {
            if (i != p && i != q)
                Turn(ref matrix[PackedSymmetric.At(i, p)], ref matrix[PackedSymmetric.At(i, q)], cosine, sine);
            Turn(ref vectors[p * order + i], ref vectors[q * order + i], cosine, sine);
        }

        return true;
    }

    private static void Turn(ref double left, ref double right, double cosine, double sine)
    {
        double turned = sine * left + cosine * right;
        left = cosine * left - sine * right;
        right = turned;
    }
}
