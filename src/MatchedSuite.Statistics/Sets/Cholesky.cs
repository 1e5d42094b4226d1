namespace MatchedSuite.Statistics.Sets;

/// <summary>Triangular factor of a small information matrix, restricted to some of its columns.</summary>
/// <remarks>Matrices are square, row after row; only the lower triangle is read or written.</remarks>
internal static class Cholesky
{
    // What is left of a column after the others, as a share of it, below which it counts as following from them.
    // Decimals leave about 1e-15 there; values with an offset a million times their spread about 1e-12.
    private const double DependentShare = 1e-10;

    // Far along a rising likelihood the information fades; a factor is refused only where rounding has taken over.
    private const double SingularShare = 1e-15;

    /// <summary>Picks the columns that do not follow from the ones in front of them.</summary>
    /// <param name="matrix">Information, <paramref name="order"/> × <paramref name="order"/>.</param>
    /// <param name="order">Number of columns.</param>
    /// <param name="independent">Receives the picked columns in their order.</param>
    /// <param name="factor">Working memory, order × order.</param>
    /// <returns>How many were picked.</returns>
    public static int Independent(ReadOnlySpan<double> matrix, int order, Span<int> independent, Span<double> factor)
    {
        int picked = 0;
        for (int column = 0; column < order; column++)
        {
            independent[picked] = column;
            double left = FactorRow(matrix, order, independent, picked, factor, order);
            if (left > DependentShare * matrix[(column * order) + column])
                picked++;
        }

        return picked;
    }

    /// <summary>Factors the picked rows and columns; false where they are singular to rounding.</summary>
    /// <param name="matrix">A symmetric matrix, <paramref name="order"/> × <paramref name="order"/>.</param>
    /// <param name="order">Number of its columns.</param>
    /// <param name="picked">Columns to take, in order.</param>
    /// <param name="factor">Receives the factor, as many columns as picked.</param>
    public static bool TryFactor(ReadOnlySpan<double> matrix, int order, ReadOnlySpan<int> picked, Span<double> factor)
    {
        for (int row = 0; row < picked.Length; row++)
        {
            double left = FactorRow(matrix, order, picked, row, factor, picked.Length);
            if (!(left > SingularShare * matrix[(picked[row] * order) + picked[row]]))
                return false;
        }

        return true;
    }

    /// <summary>Turns v into the solution y of L·y = v; its squared length is v'·A⁻¹·v.</summary>
    public static void SolveLower(ReadOnlySpan<double> factor, Span<double> v)
    {
        int order = v.Length;
        for (int row = 0; row < order; row++)
        {
            for (int column = 0; column < row; column++)
                v[row] -= factor[(row * order) + column] * v[column];
            v[row] /= factor[(row * order) + row];
        }
    }

    /// <summary>Turns y into the solution x of L'·x = y.</summary>
    public static void SolveUpper(ReadOnlySpan<double> factor, Span<double> y)
    {
        int order = y.Length;
        for (int row = order - 1; row >= 0; row--)
        {
            for (int below = row + 1; below < order; below++)
                y[row] -= factor[(below * order) + row] * y[below];
            y[row] /= factor[(row * order) + row];
        }
    }

    /// <summary>
    /// b'·V⁻¹·b for the last entries of the coefficient vector, V their block of the inverse: the Wald chi-square of
    /// those coefficients, the others left free.
    /// </summary>
    /// <param name="factor">Factor of the information, order × order.</param>
    /// <param name="order">Number of coefficients.</param>
    /// <param name="last">The last coefficients.</param>
    public static double WaldOfLast(ReadOnlySpan<double> factor, int order, ReadOnlySpan<double> last)
    {
        int from = order - last.Length;
        double sum = 0;
        for (int column = from; column < order; column++)
        {
            double entry = 0;
            for (int row = column; row < order; row++)
                entry += factor[(row * order) + column] * last[row - from];
            sum += entry * entry;
        }

        return sum;
    }

    private static double FactorRow(
        ReadOnlySpan<double> matrix, int order, ReadOnlySpan<int> picked, int row, Span<double> factor, int stride)
    {
        for (int column = 0; column <= row; column++)
        {
            double left = matrix[(picked[row] * order) + picked[column]];
            for (int k = 0; k < column; k++)
                left -= factor[(row * stride) + k] * factor[(column * stride) + k];
            if (column == row)
            {
                factor[(row * stride) + row] = Math.Sqrt(Math.Max(left, 0));
                return left;
            }

            factor[(row * stride) + column] = left / factor[(column * stride) + column];
        }

        return 0;
    }
}
