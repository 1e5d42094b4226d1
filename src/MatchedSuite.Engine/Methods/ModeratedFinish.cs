using MatchedSuite.Engine.Adjusting;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Distributions;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Study.Definition;

namespace MatchedSuite.Engine.Methods;

/// <summary>Finishes the moderated paired t once every endpoint's variance is known: family by family, within a contrast and stratum.</summary>
internal static class ModeratedFinish
{
    /// <summary>Name of the method; its rows hold the plain paired t until they are finished.</summary>
    public const string Method = "moderated-paired-t";

    /// <summary>Rewrites the method's rows, if the plan has it.</summary>
    /// <param name="rows">All rows of the run.</param>
    /// <param name="plan">The plan.</param>
    /// <param name="family">Name of an endpoint's family, by its position.</param>
    public static void Run(RecordStore<ResultRow> rows, AnalysisPlan plan, Func<int, string> family)
    {
        int code = plan.MethodNames.ToList().IndexOf(Method);
        if (code < 0)
            return;
        var groups = new Dictionary<(short Contrast, short Stratum, string Family), List<int>>();
        rows.Scan((int position, in ResultRow row) =>
        {
            if (row.Method != code)
                return;
            var key = (row.Contrast, row.Stratum, family(row.Endpoint));
            if (!groups.TryGetValue(key, out List<int>? members))
                groups.Add(key, members = []);
            members.Add(position);
        });
        foreach (List<int> members in groups.Values)
            Finish(rows, members, plan.Options);
    }

    /// <summary>Intervals of finished primary rows at other confidences: the moderated error is in the row, so nothing is fitted again.</summary>
    public static void SetIntervals(RecordStore<ResultRow> rows, AnalysisPlan plan, IntervalPlan wanted, AdjustedColumns columns)
    {
        int code = plan.MethodNames.ToList().IndexOf(Method);
        if (code < 0)
            return;
        rows.Scan((int position, in ResultRow row) =>
        {
            if (row.Method != code)
                return;
            foreach (IntervalKind kind in wanted.Kinds)
            {
                double confidence = wanted.Confidence(kind, position);
                if (!double.IsNaN(confidence))
                    columns.SetInterval(kind, position, IntervalOf(row, plan.Options with { Confidence = confidence }));
            }
        });
    }

    private static Interval IntervalOf(in ResultRow row, TestOptions options)
    {
        double reach = row.StandardError * StudentT.UpperQuantile(options.TailShare, row.DegreesOfFreedom);
        return Interval.Pointing(row.Estimate - reach, row.Estimate + reach, options.Sides);
    }

    private static void Finish(RecordStore<ResultRow> rows, List<int> members, TestOptions options)
    {
        var variances = new double[members.Count];
        var degreesOfFreedom = new double[members.Count];
        var one = new ResultRow[1];
        for (int i = 0; i < members.Count; i++)
        {
            rows.Read(members[i], one);
            TestResult plain = one[0].ToTestResult();
            variances[i] = plain.Outcome == Outcome.Tested ? ModeratedPairedT.VarianceOf(plain) : double.NaN;
            degreesOfFreedom[i] = plain.DegreesOfFreedom;
        }

        VariancePrior? prior = VariancePrior.Fit(variances, degreesOfFreedom);
        foreach (int member in members)
        {
            rows.Read(member, one);
            one[0].Take(ModeratedPairedT.Finish(one[0].ToTestResult(), prior, options));
            rows.Rewrite(member, one[0]);
        }
    }
}
