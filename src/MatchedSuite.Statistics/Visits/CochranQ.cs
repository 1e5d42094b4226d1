using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Statistics.Visits;

/// <summary>Cochran's Q: does the share of a yes/no sign differ between visits?</summary>
/// <remarks>
/// <para>Only subjects seen at every visit enter; values are 0 or 1. Q = (k − 1)·(kΣC² − T²)/(kT − ΣR²) with column totals C,
/// row totals R and grand total T, compared with χ² on k − 1 degrees of freedom. With two visits it is McNemar's χ² without
/// correction. The test has no direction: sides are not used.</para>
/// <para>Subjects with the same sign at every visit say nothing and add nothing. Assumes independent subjects and enough of
/// those that change (about 24 changing signs in all).</para>
/// <para>Source: Cochran (1950), Biometrika 37, 256-266. Worked through in docs/methods/cochran-q.md.</para>
/// </remarks>
public static class CochranQ
{
    /// <summary>Tests one endpoint.</summary>
    /// <exception cref="ArgumentException">A value is neither 0 nor 1.</exception>
    public static TestResult Run(in VisitSample sample, TestOptions options, Scratch scratch)
    {
        using var frame = scratch.Open();
        var complete = sample.Complete(frame);
        int n = complete.Subjects, k = complete.Visits;
        if (n < 2)
            return TestResult.Untested(Outcome.TooFewSets, n, n * k);
        Span<long> columns = frame.Longs(k);
        columns.Clear();
        long total = 0, rowSquares = 0, columnSquares = 0;
        for (int i = 0; i < n; i++)
        {
            long row = Count(complete.Subject(i), columns);
            total += row;
            rowSquares += row * row;
        }

        foreach (long column in columns)
            columnSquares += column * column;
        long spread = k * total - rowSquares;
        if (spread == 0)
            return TestResult.Untested(Outcome.NothingDiffers, n, n * k);
        double q = (k - 1) * (double)(k * columnSquares - total * total) / spread;
        return new TestResult
        {
            Sets = n,
            Samples = n * k,
            Statistic = q,
            DegreesOfFreedom = k - 1,
            P = ChiSquared.UpperTail(q, k - 1),
            EffectSize = q / (n * (k - 1.0)),
        };
    }

    private static long Count(ReadOnlySpan<double> row, Span<long> columns)
    {
        long count = 0;
        for (int j = 0; j < row.Length; j++)
        {
            if (row[j] is not (0 or 1))
                throw new ArgumentException($"A yes/no value is {row[j]:R}; it must be 0 or 1.", nameof(row));
            long one = row[j] == 1 ? 1 : 0;
            columns[j] += one;
            count += one;
        }

        return count;
    }
}
