using MatchedSuite.Engine.Output;
using MatchedSuite.Engine.Running;

namespace MatchedSuite.Reporting;

/// <summary>Puts the pages for people into a run's folder.</summary>
public static class RunPages
{
    /// <summary>Writes <c>audit/matching.md</c>.</summary>
    public static void WriteMatching(StudyInputs inputs, RunFolder folder) =>
        File.WriteAllText(folder.PathOf("audit/matching.md"), MatchingPage.Text(inputs.Study, inputs.Audit));

    /// <summary>Writes <c>summary.md</c>.</summary>
    public static void WriteSummary(FinishedRun run, RunFolder folder) =>
        File.WriteAllText(folder.PathOf("summary.md"), SummaryPage.Text(run));
}
