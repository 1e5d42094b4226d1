namespace MatchedSuite.Statistics.Pairs;

/// <summary>Stuart–Maxwell test of marginal homogeneity: is every category as frequent in the index role as in the reference role?</summary>
/// <remarks>
/// <para>Statistic: d′V⁻d with d(i) the row total less the column total, V(i,i) = their sum less twice n(i,i) and V(i,j) = −(n(i,j) + n(j,i)); chi-squared
/// with the rank of V. That is k − 1 where the categories hang together; a category that no pair enters or leaves adds
/// nothing, and groups of categories without moves between them are tested each for itself. For two categories it is
/// <see cref="McNemar"/>. The test has no direction: a one-sided request is answered two-sided and remarked. No
/// estimate.</para>
/// <para>Assumes independent pairs and enough moves for the approximation. Sources: Stuart (1955), Biometrika 42, 412-416; Maxwell
/// (1970), British Journal of Psychiatry 116, 651-655. Worked through in docs/methods/stuart-maxwell.md.</para>
/// </remarks>
public static class StuartMaxwell
{
    // V is made of whole numbers; what elimination leaves of a pivot below this share is rounding.
    private const double SingularShare = 1e-10;

    /// <inheritdoc cref="Bowker.Run"/>
    public static TestResult Run(in PairSample pairs, TestOptions options, Scratch scratch)
    {
        int n = pairs.Count;
        if (n == 0)
            return TestResult.Untested(Outcome.TooFewSets, 0, 0);
        using var frame = scratch.Open();
        var table = SquareTable.Of(pairs, frame);
        if (table.IsTooLarge)
            return TestResult.Untested(Outcome.TooManyCategories, n, 2 * n);
        int k = table.Categories;
        Span<double> differences = frame.Doubles(k);
        Span<double> covariance = frame.Doubles(k * k);
        for (int i = 0; i < k; i++)
        {
            double difference = 0, moves = 0;
            for (int j = 0; j < k; j++)
            {
                covariance[(i * k) + j] = -((double)table[i, j] + table[j, i]);
                difference += table[i, j] - table[j, i];
                moves += i == j ? 0 : (double)table[i, j] + table[j, i];
            }

            differences[i] = difference;
            covariance[(i * k) + i] = moves;
        }

        var (statistic, rank) = QuadraticForm(covariance, differences);
        return SquareTable.ResultOf(statistic, rank, n, options);
    }

    // Elimination in place; the last category of each group that hangs together has no pivot left, and no difference either.
    private static (double Value, int Rank) QuadraticForm(Span<double> matrix, Span<double> vector)
    {
        int k = vector.Length, rank = 0;
        double value = 0;
        for (int column = 0; column < k; column++)
        {
            double moves = 0;
            for (int j = 0; j < k; j++)
                moves = Math.Max(moves, Math.Abs(matrix[(column * k) + j]));
            double pivot = matrix[(column * k) + column];
            if (!(pivot > SingularShare * Math.Max(moves, 1)))
                continue;
            rank++;
            value += vector[column] * vector[column] / pivot;
            for (int row = column + 1; row < k; row++)
            {
                double factor = matrix[(row * k) + column] / pivot;
                vector[row] -= factor * vector[column];
                for (int j = column + 1; j < k; j++)
                    matrix[(row * k) + j] -= factor * matrix[(column * k) + j];
            }
        }

        return (value, rank);
    }
}
