using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Output;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Engine.Running;
using Microsoft.Data.Analysis;

namespace MatchedSuite.Reporting;

/// <summary>The first rows of a run's summary as a small typed table, from which console and page are printed.</summary>
internal static class SummaryFrame
{
    /// <summary>One row for each row of <see cref="FinishedRun.Top"/>, in its order.</summary>
    public static DataFrame Of(FinishedRun run)
    {
        IReadOnlyList<SummaryRow> top = run.Top;
        var columns = new List<DataFrameColumn> { Text("endpoint", top, row => row.Endpoint.Label ?? row.Endpoint.Name) };
        if (run.Plan.Contrasts.Count > 1)
            columns.Add(Text("contrast", top, row => row.Contrast));
        columns.Add(Text("method", top, row => row.Method));
        columns.Add(new Int32DataFrameColumn("n", top.Select(row => row.Row.Sets)));
        columns.Add(Text("effect", top, row => NumberText.Quantity(Shown(row, row.Row.Estimate))));
        columns.Add(Text(
            IntervalName(run), top,
            row => double.IsNaN(row.Row.Low)
                ? "–"
                : $"{NumberText.Quantity(Shown(row, row.Row.Low))} to {NumberText.Quantity(Shown(row, row.Row.High))}"));
        columns.Add(Text("scale", top, row => ScaleText.Of(row, run.Plan.Study.Endpoints)));
        columns.Add(Text("p", top, row => NumberText.P(row.Row.P)));
        for (int i = 0; i < run.Plan.Adjustments.Count; i++)
        {
            int adjustment = i;
            Adjustment rule = run.Plan.Adjustments[i];
            columns.Add(Text(rule.Name, top, row => NumberText.P(row.Adjusted[adjustment]) + (row.Rejected[adjustment] ? " *" : "  ")));
        }

        columns.Add(Text("flags", top, row => RemarkCodes.Join(row.Row.Remarks)));
        return new DataFrame(columns);
    }

    private static StringDataFrameColumn Text(string name, IReadOnlyList<SummaryRow> rows, Func<SummaryRow, string> cell) =>
        new(name, rows.Select(cell));

    private static string IntervalName(FinishedRun run) => $"{NumberText.Percent(run.Plan.Options.Confidence)} interval";

    // Logarithms are shown as the ratio they stand for.
    private static double Shown(SummaryRow row, double value)
    {
        var scale = (LogBase)row.Row.LogBase;
        return scale == LogBase.None ? value : Ratio.Of(value, scale);
    }
}
