using System.Text;
using MatchedSuite.Engine.Running;

namespace MatchedSuite.Reporting;

/// <summary><c>summary.md</c>: what a person reads first.</summary>
internal static class SummaryPage
{
    /// <summary>Counts, first rows, warnings, cautions.</summary>
    public static string Text(FinishedRun run)
    {
        var page = new StringBuilder();
        page.Append("# ").Append(run.Plan.Study.Name).Append("\n\n");
        if (run.Plan.Study.Question is { } question)
            page.Append(question).Append("\n\n");
        foreach (string sentence in RunSentences.Of(run))
            page.Append("- ").Append(sentence).Append('\n');
        page.Append("\n## Smallest p-values\n\n").Append(FrameText.Markdown(SummaryFrame.Of(run)));
        page.Append("\nA star marks what an adjustment finds. An effect is index minus reference, or index over reference on a ratio scale; an odds ratio per unit is that of the index role; ")
            .Append("`summary.csv` has every endpoint, `results.parquet` every method with all digits.\n");
        AddList(page, "Warnings", run.Warnings);
        AddList(page, "Cautions", run.Cautions);
        return page.ToString();
    }

    private static void AddList(StringBuilder page, string heading, IReadOnlyList<string> items)
    {
        if (items.Count == 0)
            return;
        page.Append("\n## ").Append(heading).Append("\n\n");
        foreach (string item in items)
            page.Append("- ").Append(item).Append('\n');
    }
}
