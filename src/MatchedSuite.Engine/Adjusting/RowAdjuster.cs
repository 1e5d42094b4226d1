using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Multiplicity;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Adjusting;

/// <summary>Adjusts all p-values of a run once the last one is known, group by group.</summary>
internal sealed class RowAdjuster
{
    private readonly AnalysisPlan _plan;
    private readonly HypothesisTable _table;
    private readonly EndpointTraits _traits;

    /// <summary>An adjuster over the rows of a run.</summary>
    public RowAdjuster(AnalysisPlan plan, HypothesisTable table, EndpointTraits traits)
    {
        _plan = plan;
        _table = table;
        _traits = traits;
        Columns = new AdjustedColumns(plan.Adjustments.Count, table.P.Length, plan.Study.Analysis.IntervalsOverEndpoints, table.Groups);
    }

    /// <summary>The adjusted p-values so far.</summary>
    public AdjustedColumns Columns { get; }

    /// <summary>Runs every adjustment that needs nothing but p-values.</summary>
    public void AdjustByP()
    {
        for (int group = 0; group < _table.Groups.Count; group++)
            AdjustByP(_table.Groups[group], _table.Members(group));
    }

    /// <summary>Runs every adjustment by sign flips; it covers the primary rows.</summary>
    /// <param name="store">The differences of all endpoints.</param>
    /// <param name="threads">Threads to use; the results do not depend on them.</param>
    /// <param name="memory">Bytes to use; the results do not depend on them.</param>
    /// <param name="cancellation">Ends the run.</param>
    public void AdjustByFlips(DifferenceStore store, int threads, long memory, CancellationToken cancellation)
    {
        for (int number = 0; number < _table.Groups.Count; number++)
        {
            HypothesisGroup group = _table.Groups[number];
            if (group.Method != HypothesisGroup.PrimaryMethods || _plan.Flips!.Section(group.Contrast, group.Stratum) is not { } section)
                continue;
            var flips = new FlipAdjuster(_plan, group, _table.Members(number), _table, Columns);
            flips.Run(store, section, threads, memory, cancellation);
        }
    }

    private void AdjustByP(HypothesisGroup group, int[] members)
    {
        Probability[] p = Array.ConvertAll(members, row => _table.P[row]);
        double[] weights = Array.ConvertAll(members, row => _traits.Weight(_table.Endpoints[row]));
        var families = new Families(FamilyNumbers.Of(members.Select(row => _traits.Family(_table.Endpoints[row]))));
        var hypotheses = new Hypotheses { P = p, Weights = weights, Families = families };
        var adjusted = new Probability[members.Length];
        group.Hypotheses = members.Length;
        group.TrueNullShare = StoreyPi0.AtFixed(p);
        group.SimesP = Simes.Global(p);
        group.Rejected = new int?[_plan.Adjustments.Count];
        for (int adjustment = 0; adjustment < _plan.Adjustments.Count; adjustment++)
        {
            if (_plan.Adjustments[adjustment] is not PValueAdjustment rule)
                continue;
            ProcedureOf(rule)(hypotheses, adjusted);
            double level = _plan.LevelOf(rule);
            for (int i = 0; i < members.Length; i++)
                Columns.Set(adjustment, members[i], adjusted[i]);
            group.Rejected[adjustment] = adjusted.Count(value => value.IsAtMost(level));
        }

        MarkOutOfReach(hypotheses, members);
    }

    private AdjustmentProcedure ProcedureOf(PValueAdjustment rule) =>
        _plan.Study.Analysis.Family == FamilyRule.ByFamilyThenAll && rule.OverSelectedFamilies is { } selecting ? selecting : rule.Procedure;

    // The first adjustment for the family-wise error rate is the one whose first step is asked for.
    private void MarkOutOfReach(in Hypotheses hypotheses, int[] members)
    {
        if (_plan.Adjustments.FirstOrDefault(adjustment => adjustment.Controls == ErrorRate.FamilyWise) is not PValueAdjustment { FirstStep: { } firstStep })
            return;
        var thresholds = new double[members.Length];
        firstStep(hypotheses, _plan.Study.Analysis.Alpha, thresholds);
        for (int i = 0; i < members.Length; i++)
        {
            if (_table.SmallestPossible[members[i]] > thresholds[i])
                Columns.MarkOutOfReach(members[i]);
        }
    }
}
