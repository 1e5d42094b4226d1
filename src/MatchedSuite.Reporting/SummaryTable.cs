using System.Text;
using MatchedSuite.Engine.Running;

namespace MatchedSuite.Reporting;

/// <summary>What <c>analyze</c> prints: the first rows of the summary.</summary>
public static class SummaryTable
{
    /// <summary>The table, and a line on the rows it leaves out.</summary>
    public static string Text(FinishedRun run)
    {
        var text = new StringBuilder(FrameText.Plain(SummaryFrame.Of(run)));
        int left = run.PrimaryRows - run.Top.Count;
        if (left > 0)
            text.Append("… and ").Append(NumberText.Count(left)).Append(" more in summary.csv\n");
        return text.ToString();
    }
}
