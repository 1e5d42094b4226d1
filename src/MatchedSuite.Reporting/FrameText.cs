using System.Text;
using Microsoft.Data.Analysis;

namespace MatchedSuite.Reporting;

/// <summary>Prints a small table: numbers to the right, text to the left.</summary>
internal static class FrameText
{
    /// <summary>Columns under their names, two blanks apart, for a console of any width.</summary>
    public static string Plain(DataFrame frame)
    {
        string[][] cells = Cells(frame);
        int[] widths = [.. cells.Select(column => column.Max(cell => cell.Length))];
        var text = new StringBuilder();
        for (int line = 0; line <= frame.Rows.Count; line++)
        {
            var one = new StringBuilder();
            for (int column = 0; column < cells.Length; column++)
                one.Append(column == 0 ? "" : "  ").Append(Padded(frame, column, cells[column][line], widths[column]));
            text.Append(one.ToString().TrimEnd()).Append('\n');
        }

        return text.ToString();
    }

    /// <summary>The table in Markdown.</summary>
    public static string Markdown(DataFrame frame)
    {
        string[][] cells = Cells(frame);
        var table = new MarkdownTable([.. frame.Columns.Select(column => IsNumber(column) ? ">" + column.Name : column.Name)]);
        for (int line = 1; line <= frame.Rows.Count; line++)
            table.Row([.. cells.Select(column => column[line].Trim())]);
        return table.ToString();
    }

    // The name, then the rows, column by column.
    private static string[][] Cells(DataFrame frame) =>
        [.. frame.Columns.Select(column => Enumerable.Range(0, (int)column.Length)
            .Select(row => column[row]?.ToString() ?? "")
            .Prepend(column.Name)
            .ToArray())];

    private static string Padded(DataFrame frame, int column, string cell, int width) =>
        IsNumber(frame.Columns[column]) ? cell.PadLeft(width) : cell.PadRight(width);

    private static bool IsNumber(DataFrameColumn column) => column is not StringDataFrameColumn;
}
