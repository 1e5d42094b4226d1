using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Multiplicity.Resampling;

namespace MatchedSuite.Engine.Adjusting;

/// <summary>Runs the adjustments by sign flips, or by relabelings, over one group of primary rows.</summary>
internal sealed class FlipAdjuster(AnalysisPlan plan, HypothesisGroup group, int[] members, HypothesisTable table, AdjustedColumns columns)
{
    /// <summary>Runs them.</summary>
    public void Run(DifferenceStore store, FlipSection section, int threads, long memory, CancellationToken cancellation)
    {
        int firstFamilyWise = plan.Adjustments.ToList().FindIndex(adjustment => adjustment.Controls == ErrorRate.FamilyWise);
        var differences = new GroupDifferences(store, section, Array.ConvertAll(members, row => table.Endpoints[row]));
        for (int adjustment = 0; adjustment < plan.Adjustments.Count; adjustment++)
        {
            if (plan.Adjustments[adjustment] is not ResamplingAdjustment rule)
                continue;
            group.Rejected[adjustment] = 0;
            if (members.Length == 0)
                continue;
            ResamplingOptions options = Options(threads, memory);
            ResamplingResult result = section.Blocks is { } blocks
                ? rule.OverLabels!(differences, blocks, options, cancellation)
                : rule.Procedure(differences, options, cancellation);
            for (int i = 0; i < members.Length; i++)
                columns.Set(adjustment, members[i], result.StepDown[i]);
            group.Rejected[adjustment] = result.StepDown.Count(p => p.IsAtMost(plan.LevelOf(rule)));
            group.Flips.Add(new FlipFacts(rule.Name, result.Flips, result.Exhaustive, result.CriticalValue));
            if (adjustment == firstFamilyWise)
                MarkOutOfReach(result, section.Blocks);
        }
    }

    private ResamplingOptions Options(int threads, long memory) => new()
    {
        Seed = plan.Study.Seed,
        Resamples = plan.Study.Analysis.Resamples,
        Sides = plan.Options.Sides,
        Statistic = plan.Flips!.Statistic,
        Level = plan.Study.Analysis.Alpha,
        Threads = threads,
        PanelMemory = memory,
    };

    // An adjusted p-value is not below what the number of patterns allows; where all are listed, one that mirrors the data reaches it too.
    // Of flips it is not below the endpoint's own smallest p-value either; labels are compared by a statistic that need not be the method's.
    private void MarkOutOfReach(ResamplingResult result, RelabelBlocks? blocks)
    {
        bool hasMirror = blocks?.IsBalanced ?? true;
        int unavoidable = hasMirror && result.Exhaustive && plan.Options.Sides == Sides.Two ? 2 : 1;
        double smallest = unavoidable / (1.0 + result.Flips);
        foreach (int row in members)
        {
            if (smallest > plan.Study.Analysis.Alpha || (blocks is null && table.SmallestPossible[row] > plan.Study.Analysis.Alpha))
                columns.MarkOutOfReach(row);
        }
    }
}
