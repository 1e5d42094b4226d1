namespace MatchedSuite.Statistics.Pairs;

/// <summary>Least squares of endpoint differences on covariate differences and, last, the one column that is asked about.</summary>
/// <remarks>
/// <para>The columns are made orthogonal in their order (modified Gram–Schmidt, each projection twice), so what is left of the last
/// one is what no covariate explains, and its coefficient and error need nothing else. A covariate of which next to nothing is left
/// follows from those before it and is left out. Columns are scaled by powers of two first, which changes no digit.</para>
/// <para>Sources: Björck (1967), BIT 7, 1-21; Giraud, Langou, Rozložník and van den Eshof (2005), Numerische Mathematik 101, 87-100.</para>
/// </remarks>
internal static class DifferenceRegression
{
    // What is left of a column, as a share of its length, below which it follows from the others: decimals leave about
    // 1e-15; columns with an offset a million times their spread about 1e-10.
    private const double DependentShare = 1e-9;

    /// <summary>Regresses the differences on the covariates and <paramref name="asked"/>; no constant is added.</summary>
    /// <param name="sample">The endpoint with its covariates.</param>
    /// <param name="asked">The column whose coefficient is wanted, one entry a pair, not all zero.</param>
    /// <param name="scratch">Working memory.</param>
    public static Fit On(in RegressionPairs sample, ReadOnlySpan<double> asked, Scratch scratch)
    {
        using var frame = scratch.Open();
        int n = sample.Pairs.Count;
        Span<double> basis = frame.Doubles(n * sample.CovariateCount);
        int kept = Basis(sample, basis, frame.Integers(sample.CovariateCount));
        basis = basis[..(n * kept)];

        Span<double> column = frame.Doubles(n);
        Span<double> rest = frame.Doubles(n);
        int columnExponent = Scaled(asked, column);
        int exponent = Scaled(sample.Pairs.Differences, rest);
        int df = n - kept - 1;
        double length = Length(column);
        Orthogonalise(column, basis);
        double left = Length(column);
        if (left <= DependentShare * length)
            return new Fit(Outcome.Collinear, kept, df, double.NaN, double.NaN, double.NaN);
        if (df < 1)
            return new Fit(Outcome.TooFewSets, kept, df, double.NaN, double.NaN, double.NaN);

        Orthogonalise(rest, basis);
        double coefficient = FixedLanes.Dot(rest, column) / (left * left);
        FixedLanes.Subtract(rest, coefficient, column);
        double remainder = FixedLanes.Dot(rest, column) / (left * left);
        coefficient += remainder;
        FixedLanes.Subtract(rest, remainder, column);
        double spread = Length(rest);
        // Differences that are exactly explained leave rounding alone.
        double rounding = Math.ScaleB(FixedLanes.Largest(sample.Pairs.Roundings), -exponent) * Math.Sqrt(n);
        if (spread <= rounding)
            return new Fit(Outcome.NoVariation, kept, df, double.NaN, double.NaN, double.NaN);
        double deviation = spread / Math.Sqrt(df);
        return new Fit(Outcome.Tested, kept, df, Math.ScaleB(coefficient, exponent - columnExponent),
            Math.ScaleB(deviation / left, exponent - columnExponent), Math.ScaleB(deviation, exponent));
    }

    /// <summary>The first covariate that follows from those before it, counted from 0; −1 where none does.</summary>
    public static int FirstDependent(in RegressionPairs sample, Scratch scratch)
    {
        using var frame = scratch.Open();
        Span<int> picked = frame.Integers(sample.CovariateCount);
        int kept = Basis(sample, frame.Doubles(sample.Pairs.Count * sample.CovariateCount), picked);
        int column = 0;
        while (column < kept && picked[column] == column)
            column++;
        return column < sample.CovariateCount ? column : -1;
    }

    // Orthonormal columns that span the covariates; gives how many they are and which covariates they come from.
    private static int Basis(in RegressionPairs sample, Span<double> basis, Span<int> picked)
    {
        int n = sample.Pairs.Count, kept = 0;
        for (int covariate = 0; covariate < sample.CovariateCount; covariate++)
        {
            var column = basis.Slice(kept * n, n);
            Scaled(sample.Covariate(covariate), column);
            double length = Length(column);
            Orthogonalise(column, basis[..(kept * n)]);
            double left = Length(column);
            if (left <= DependentShare * length)
                continue;
            for (int i = 0; i < n; i++)
                column[i] /= left;
            picked[kept++] = covariate;
        }

        return kept;
    }

    private static void Orthogonalise(Span<double> column, ReadOnlySpan<double> basis)
    {
        for (int pass = 0; pass < 2; pass++)
        {
            for (int start = 0; start < basis.Length; start += column.Length)
            {
                var unit = basis.Slice(start, column.Length);
                FixedLanes.Subtract(column, FixedLanes.Dot(column, unit), unit);
            }
        }
    }

    private static double Length(ReadOnlySpan<double> column) => Math.Sqrt(FixedLanes.Dot(column, column));

    private static int Scaled(ReadOnlySpan<double> column, Span<double> scaled)
    {
        double size = Math.Max(FixedLanes.Largest(column), -FixedLanes.Smallest(column));
        int exponent = size == 0 ? 0 : Math.ILogB(size);
        for (int i = 0; i < scaled.Length; i++)
            scaled[i] = Math.ScaleB(column[i], -exponent);
        return exponent;
    }

    /// <summary>What the regression found about the column asked for.</summary>
    /// <param name="Outcome">Tested, or why not; then the numbers after <paramref name="DegreesOfFreedom"/> are NaN.</param>
    /// <param name="Kept">Covariates that were adjusted for.</param>
    /// <param name="DegreesOfFreedom">Pairs less covariates less one.</param>
    /// <param name="Coefficient">Endpoint unit over the unit of the column.</param>
    /// <param name="Error">Its standard error.</param>
    /// <param name="Deviation">Residual standard deviation, endpoint unit.</param>
    internal readonly record struct Fit(
        Outcome Outcome, int Kept, int DegreesOfFreedom, double Coefficient, double Error, double Deviation);
}
