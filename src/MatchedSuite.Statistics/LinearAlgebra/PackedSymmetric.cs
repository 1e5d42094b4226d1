namespace MatchedSuite.Statistics.LinearAlgebra;

/// <summary>Small symmetric matrices as their lower triangle, row after row: element (r, c ≤ r) stands at r(r+1)/2 + c.</summary>
/// <remarks>Sums run in the order of the indices, so the bits are the same on every machine.</remarks>
internal static class PackedSymmetric
{
    /// <summary>Numbers that a matrix of <paramref name="order"/> rows takes.</summary>
    public static int Length(int order) => order * (order + 1) / 2;

    /// <summary>Place of element (<paramref name="row"/>, <paramref name="column"/>), in either order.</summary>
    public static int At(int row, int column) =>
        row >= column ? row * (row + 1) / 2 + column : column * (column + 1) / 2 + row;

    /// <summary>The product of the leading block of <paramref name="order"/> rows with a vector.</summary>
    public static void Multiply(ReadOnlySpan<double> matrix, ReadOnlySpan<double> vector, int order, Span<double> product)
    {
        product[..order].Clear();
        int at = 0;
        for (int row = 0; row < order; row++)
        {
            double own = vector[row], sum = 0;
            for (int column = 0; column < row; column++, at++)
            {
                sum += matrix[at] * vector[column];
                product[column] += matrix[at] * own;
            }

            product[row] += sum + matrix[at++] * own;
        }
    }

    /// <summary>v'Mv over the leading block of <paramref name="order"/> rows.</summary>
    public static double QuadraticForm(ReadOnlySpan<double> matrix, ReadOnlySpan<double> vector, int order)
    {
        double diagonal = 0, below = 0;
        int at = 0;
        for (int row = 0; row < order; row++)
        {
            double sum = 0;
            for (int column = 0; column < row; column++, at++)
                sum += matrix[at] * vector[column];
            below += sum * vector[row];
            diagonal += matrix[at++] * vector[row] * vector[row];
        }

        return diagonal + 2 * below;
    }

    /// <summary>The trace of the product of two matrices of <paramref name="order"/> rows.</summary>
    public static double TraceOfProduct(ReadOnlySpan<double> left, ReadOnlySpan<double> right, int order)
    {
        double diagonal = 0, below = 0;
        int at = 0;
        for (int row = 0; row < order; row++)
        {
            for (int column = 0; column < row; column++, at++)
                below += left[at] * right[at];
            diagonal += left[at] * right[at];
            at++;
        }

        return diagonal + 2 * below;
    }
}
