namespace MatchedSuite.Statistics.LinearAlgebra;

/// <summary>Cholesky's factor L of a small packed symmetric matrix M = LL', with dependent columns set aside.</summary>
internal static class Cholesky
{
    /// <summary>
    /// Factors a matrix. A column whose pivot is not above its entry in <paramref name="smallestPivots"/> depends on the ones
    /// before it: it becomes zero and does not count in the rank.
    /// </summary>
    /// <param name="matrix">Packed, <paramref name="order"/> rows, positive semi-definite up to rounding.</param>
    /// <param name="order">Rows.</param>
    /// <param name="smallestPivots">One threshold a column, at least 0.</param>
    /// <param name="factor">Room for the packed factor.</param>
    /// <returns>The rank.</returns>
    public static int Factor(ReadOnlySpan<double> matrix, int order, ReadOnlySpan<double> smallestPivots, Span<double> factor)
    {
        int rank = 0;
        for (int row = 0, start = 0; row < order; start += ++row)
        {
            int upper = 0;
            for (int column = 0; column < row; column++)
            {
                double sum = matrix[start + column];
                for (int i = 0; i < column; i++)
                    sum -= factor[start + i] * factor[upper + i];
                upper += column;
                double pivot = factor[upper++];
                factor[start + column] = pivot == 0 ? 0 : sum / pivot;
            }

            double rest = matrix[start + row];
            for (int i = 0; i < row; i++)
                rest -= factor[start + i] * factor[start + i];
            bool independent = rest > smallestPivots[row];
            factor[start + row] = independent ? Math.Sqrt(rest) : 0;
            if (independent)
                rank++;
        }

        return rank;
    }

    /// <summary>ln |M| of the leading block of <paramref name="order"/> rows, of full rank.</summary>
    public static double LogDeterminant(ReadOnlySpan<double> factor, int order)
    {
        double sum = 0;
        for (int row = 0; row < order; row++)
            sum += Math.Log(factor[PackedSymmetric.At(row, row)]);
        return 2 * sum;
    }

    /// <summary>Solves L'x = b in place over the leading block of <paramref name="order"/> rows, of full rank.</summary>
    public static void SolveTransposed(ReadOnlySpan<double> factor, int order, Span<double> vector)
    {
        for (int row = order - 1; row >= 0; row--)
        {
            double sum = vector[row];
            for (int below = row + 1; below < order; below++)
                sum -= factor[PackedSymmetric.At(below, row)] * vector[below];
            vector[row] = sum / factor[PackedSymmetric.At(row, row)];
        }
    }

    /// <summary>The packed inverse of the leading block of <paramref name="order"/> rows, of full rank.</summary>
    /// <param name="factor">Packed factor.</param>
    /// <param name="order">Rows of the block.</param>
    /// <param name="work">Room for as many numbers as the packed block has.</param>
    /// <param name="inverse">Room for the packed inverse.</param>
    public static void Invert(ReadOnlySpan<double> factor, int order, Span<double> work, Span<double> inverse)
    {
        // work becomes the inverse of L, also lower triangular.
        for (int row = 0, start = 0; row < order; start += ++row)
        {
            double reciprocal = 1 / factor[start + row];
            for (int column = 0; column < row; column++)
            {
                double sum = 0;
                for (int i = column; i < row; i++)
                    sum += factor[start + i] * work[PackedSymmetric.At(i, column)];
                work[start + column] = -sum * reciprocal;
            }

            work[start + row] = reciprocal;
        }

        for (int row = 0; row < order; row++)
        {
            for (int column = 0; column <= row; column++)
            {
                double sum = 0;
                for (int i = row; i < order; i++)
                    sum += work[PackedSymmetric.At(i, row)] * work[PackedSymmetric.At(i, column)];
                inverse[PackedSymmetric.At(row, column)] = sum;
            }
        }
    }
}
