using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Adjusting;

/// <summary>Adjusts all p-values of a run once the last one is known.</summary>
internal static class RowAdjuster
{
    /// <summary>Adjusts the rows of a store, group by group.</summary>
    /// <param name="rows">Every row of the run.</param>
    /// <param name="plan">Which adjustments and which family rule.</param>
    /// <param name="family">Name of an endpoint's family, by its position.</param>
    public static AdjustedColumns Run(RowStore rows, AnalysisPlan plan, Func<int, string> family)
    {
        var p = new Probability[rows.Count];
        var groupOfRow = new int[rows.Count];
        List<HypothesisGroup> groups = Collect(rows, plan, family, p, groupOfRow);
        int[][] members = Members(groups.Count, p, groupOfRow);
        var columns = new Probability[plan.Adjustments.Count][];
        for (int adjustment = 0; adjustment < columns.Length; adjustment++)
        {
            columns[adjustment] = new Probability[rows.Count];
            Array.Fill(columns[adjustment], Probability.Missing);
        }

        for (int group = 0; group < groups.Count; group++)
        {
            groups[group].Hypotheses = members[group].Length;
            groups[group].Rejected = AdjustGroup(members[group], p, plan, columns);
        }

        return new AdjustedColumns(columns, groups);
    }

    private static List<HypothesisGroup> Collect(
        RowStore rows, AnalysisPlan plan, Func<int, string> family, Probability[] p, int[] groupOfRow)
    {
        bool byFamily = plan.Study.Analysis.Family != FamilyRule.All;
        var groups = new List<HypothesisGroup>();
        var known = new Dictionary<HypothesisGroup, int>();
        rows.Scan((int position, in ResultRow row) =>
        {
            short method = row.Primary == 1 ? HypothesisGroup.PrimaryMethods : row.Method;
            var key = new HypothesisGroup(row.Contrast, row.Stratum, method, byFamily ? family(row.Endpoint) : null);
            if (!known.TryGetValue(key, out int group))
            {
                group = groups.Count;
                known.Add(key, group);
                groups.Add(key with { });
            }

            groupOfRow[position] = group;
            p[position] = row.P;
        });
        return groups;
    }

    private static int[][] Members(int groups, Probability[] p, int[] groupOfRow)
    {
        var sizes = new int[groups];
        for (int row = 0; row < p.Length; row++)
        {
            if (!p[row].IsMissing)
                sizes[groupOfRow[row]]++;
        }

        int[][] members = [.. sizes.Select(size => new int[size])];
        Array.Clear(sizes);
        for (int row = 0; row < p.Length; row++)
        {
            if (!p[row].IsMissing)
                members[groupOfRow[row]][sizes[groupOfRow[row]]++] = row;
        }

        return members;
    }

    private static int[] AdjustGroup(int[] members, Probability[] p, AnalysisPlan plan, Probability[][] columns)
    {
        var raw = new Probability[members.Length];
        var adjusted = new Probability[members.Length];
        var rejected = new int[columns.Length];
        for (int i = 0; i < members.Length; i++)
            raw[i] = p[members[i]];
        for (int adjustment = 0; adjustment < columns.Length; adjustment++)
        {
            Adjustment rule = plan.Adjustments[adjustment];
            rule.Procedure(raw, adjusted);
            for (int i = 0; i < members.Length; i++)
            {
                columns[adjustment][members[i]] = adjusted[i];
                if (adjusted[i].IsAtMost(plan.LevelOf(rule)))
                    rejected[adjustment]++;
            }
        }

        return rejected;
    }
}
