using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>Gives estimates per standard deviation of the reference samples.</summary>
internal static class StandardScale
{
    /// <summary>Rescales rows that are on the analysis scale; without spread among the reference samples they are untested.</summary>
    /// <param name="reference">Values of the reference samples on the analysis scale; NaN where missing.</param>
    /// <param name="rows">The rows.</param>
    /// <param name="scratch">Working memory.</param>
    public static void Apply(ReadOnlySpan<double> reference, Span<ResultRow> rows, Scratch scratch)
    {
        double deviation = DeviationOf(reference, scratch);
        foreach (ref ResultRow row in rows)
        {
            row.LogBase = (short)LogBase.None;
            if (deviation > 0)
                row.DivideBy(deviation);
            else
                row.Take(TestResult.Untested(Outcome.NoReferenceSpread, row.Sets, row.Samples));
        }
    }

    /// <summary>Standard deviation, with n − 1, of the values that are there; NaN for fewer than two.</summary>
    public static double DeviationOf(ReadOnlySpan<double> values, Scratch scratch)
    {
        using Scratch.Frame frame = scratch.Open();
        Span<double> known = frame.Doubles(values.Length);
        int count = 0;
        foreach (double value in values)
        {
            if (!double.IsNaN(value))
                known[count++] = value;
        }

        return count < 2 ? double.NaN : MeanAndDeviation.Of(known[..count], scratch).Deviation;
    }
}
