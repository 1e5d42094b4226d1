using MatchedSuite.Engine.Adjusting;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Engine.Running;

namespace MatchedSuite.Reporting;

/// <summary>The counts of a run in sentences.</summary>
public static class RunSentences
{
    /// <summary>Sets, endpoints, tests, and what each adjustment finds.</summary>
    public static IReadOnlyList<string> Of(FinishedRun run)
    {
        var sentences = new List<string>
        {
            $"{NumberText.Count(run.Plan.Arrangement.Sets.Length)} {(run.Audit.Patterns is null ? "sets" : "subjects")} ({NumberText.Count(run.Plan.Arrangement.Rows.Length)} of "
            + $"{NumberText.Count(run.Audit.Dispositions.Length)} samples), {NumberText.Count(run.Endpoints)} endpoints, "
            + $"{NumberText.Count(run.TestedRows)} tested, {NumberText.Count(run.PrimaryRows - run.TestedRows)} not (audit/untested.csv).",
        };
        foreach (HypothesisGroup group in run.Groups.Where(group => group.IsMain))
            sentences.AddRange(run.Plan.Adjustments.Select((rule, i) => Finding(run, group, rule, group.Rejected[i] ?? 0)));
        sentences.AddRange(run.Guaranteed.Where(whole => whole.Stratum == ResultRow.AllStrata).Select(whole => Guarantee(run, whole)));
        return sentences;
    }

    private static string Guarantee(FinishedRun run, GuaranteedDiscoveries whole) =>
        $"{Contrast(run, whole.Contrast)}at least {NumberText.Count(whole.AtLeast)} of {NumberText.Count(whole.Tested)} differ, with confidence "
        + $"{NumberText.Percent(1 - run.Plan.Study.Analysis.Alpha)} (discoveries.csv bounds every top list, families.csv every family).";

    private static string Contrast(FinishedRun run, short contrast) => run.Plan.Contrasts.Count > 1 ? $"{run.Plan.ContrastName(contrast)}: " : "";

    private static string Finding(FinishedRun run, HypothesisGroup group, Adjustment rule, int rejected)
    {
        string contrast = Contrast(run, group.Contrast);
        string family = group.Family is null ? "" : $"family {group.Family}: ";
        string rate = rule.Controls == ErrorRate.FamilyWise ? "the chance of any false finding" : "the expected share of false findings";
        return $"{contrast}{family}{rule.Name} finds {NumberText.Count(rejected)} of {NumberText.Count(group.Hypotheses)}, "
            + $"{rate} held at {NumberText.Percent(run.Plan.LevelOf(rule))}.";
    }
}
