using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>Adds the rows of pair methods for one comparison of two places; one worker owns it and reuses it.</summary>
/// <param name="plan">The plan.</param>
/// <param name="aboveBelow">The method for values above and below a detection limit; null where no endpoint has one.</param>
/// <param name="scratch">Working memory of the worker.</param>
internal sealed class PairRows(AnalysisPlan plan, PlannedMethod? aboveBelow, Scratch scratch)
{
    private readonly StrataRows _between = new(plan.Arrangement.Strata.Length, plan.Options);
    private readonly bool _effectIntervals = plan.Study.Analysis.Intervals.Contains(IntervalKind.EffectSize);

    /// <summary>Adds one method's rows: stratum by stratum, then the comparison between strata.</summary>
    /// <param name="index">Values of the index place on the analysis scale, one a set; NaN where missing.</param>
    /// <param name="reference">Values of the reference place.</param>
    /// <param name="places">The comparison.</param>
    /// <param name="strata">The sets behind each row.</param>
    /// <param name="planned">The method.</param>
    /// <param name="endpoint">What is known of the endpoint.</param>
    /// <param name="output">Where rows go.</param>
    public void AddMethod(
        ReadOnlySpan<double> index, ReadOnlySpan<double> reference, PairContrast places, StrataSets strata, PlannedMethod planned, EndpointInfo endpoint, BlockOutput output)
    {
        CovariateUse covariates = places.Columns.Covariates.Length == 0 ? CovariateUse.Ignored : planned.Method.Covariates;
        LogBase logBase = EstimateLogBase.Of(planned.Method.Scale, endpoint.Transform);
        Remarks unadjusted = places.Columns.Covariates.Length > 0 && covariates == CovariateUse.Ignored ? Remarks.Unadjusted : Remarks.None;
        int before = output.Rows.Count;
        _between.Clear();
        for (int position = 0; position < strata.Codes.Length; position++)
        {
            using Scratch.Frame frame = scratch.Open();
            CompletePairs pairs = CompletePairs.Of(index, reference, strata.SetsAt(position), places.Columns, covariates, plan.Study.Analysis.Zeros, frame);
            TestResult result = EndpointEvaluator.UntestedBefore(plan, pairs.Designed, pairs.Count, 2 * pairs.Count) ?? planned.Method.Test(pairs.Input, plan.Options, scratch);
            ref ResultRow row = ref output.Rows.Add();
            row.Stratum = strata.Codes[position];
            row.Missing = pairs.Designed - pairs.Count;
            row.Take(result);
            if (_effectIntervals && covariates == CovariateUse.Ignored && row.IsTested && planned.Method.EffectInterval is { } interval)
                AddInterval(interval(result, plan.Options), new DetailSink(output, contrast: 0, row.Stratum, planned.Code));
            if (strata.Comparable && row.Stratum != ResultRow.AllStrata)
                _between.Keep(row.Stratum, result, pairs.Input.Pairs, endpoint.Kind);
        }

        if (strata.Comparable && planned.Method.Strata != StrataComparison.None)
            _between.Fill(planned.Method.Strata, ref output.Rows.Add());
        foreach (ref ResultRow row in output.Rows.Records[before..])
        {
            row.Method = planned.Code;
            row.Primary = planned.IsPrimary ? (short)1 : (short)0;
            row.LogBase = (short)logBase;
            row.Remarks |= unadjusted;
        }
    }

    private static void AddInterval(Interval interval, DetailSink details)
    {
        details.Add(Quantity.EffectSizeLow, interval.Low);
        details.Add(Quantity.EffectSizeHigh, interval.High);
    }

    /// <summary>Keeps what the primary method flips; its untested rows are no hypotheses, whatever is kept of them.</summary>
    /// <param name="index">Values of the index place on the analysis scale, one a set; NaN where missing.</param>
    /// <param name="reference">Values of the reference place.</param>
    /// <param name="places">The comparison.</param>
    /// <param name="strata">The sets behind each row.</param>
    /// <param name="contrast">Position of the comparison in the plan.</param>
    /// <param name="rule">What the primary method flips.</param>
    /// <param name="flips">Which part of the endpoint's row belongs to which comparison.</param>
    /// <param name="output">Where it goes.</param>
    public void KeepDifferences(
        ReadOnlySpan<double> index, ReadOnlySpan<double> reference, PairContrast places, StrataSets strata, short contrast, FlipRule rule, FlipPlan flips, BlockOutput output)
    {
        for (int position = 0; position < strata.Codes.Length; position++)
        {
            using Scratch.Frame frame = scratch.Open();
            FlipSection section = flips.Section(contrast, strata.Codes[position])!;
            CompletePairs pairs = CompletePairs.Of(
                index, reference, strata.SetsAt(position), places.Columns, CovariateUse.Ignored, plan.Study.Analysis.Zeros, frame);
            Span<double> scores = frame.Doubles(pairs.Count);
            rule.Scores(pairs.Input.Pairs, scores, scratch);
            Span<double> kept = output.Differences.Row.Slice(section.Offset, section.Sets);
            for (int pair = 0; pair < pairs.Count; pair++)
                kept[pairs.Places[pair]] = scores[pair];
        }
    }

    /// <summary>Counts per role; where most values lie below the limit, the rows say so and above against below is tested beside them.</summary>
    /// <param name="above">For each used sample 1 above its limit, 0 below, NaN where missing.</param>
    /// <param name="places">The comparison.</param>
    /// <param name="strata">The sets behind each row.</param>
    /// <param name="endpoint">What is known of the endpoint.</param>
    /// <param name="rowsBefore">Where the endpoint's rows of this comparison begin.</param>
    /// <param name="output">Where rows go.</param>
    public void AddAboveBelow(ReadOnlySpan<double> above, PairContrast places, StrataSets strata, EndpointInfo endpoint, int rowsBefore, BlockOutput output)
    {
        using Scratch.Frame frame = scratch.Open();
        Span<double> index = frame.Doubles(places.Index.Sets);
        Span<double> reference = frame.Doubles(places.Index.Sets);
        places.Index.Gather(above, index);
        places.Reference.Gather(above, reference);
        MeanSigns.Round(index);
        MeanSigns.Round(reference);
        var (belowIndex, knownIndex) = BelowCount.Of(index);
        var (belowReference, knownReference) = BelowCount.Of(reference);
        PairDetails.AddNumber(output.Details, ResultRow.AllStrata, Quantity.IndexBelowLimit, belowIndex);
        PairDetails.AddNumber(output.Details, ResultRow.AllStrata, Quantity.ReferenceBelowLimit, belowReference);
        if (2 * (belowIndex + belowReference) <= knownIndex + knownReference)
            return;
        foreach (ref ResultRow row in output.Rows.Records[rowsBefore..])
            row.Remarks |= Remarks.MostlyBelowLimit;
        AddMethod(index, reference, places, strata, aboveBelow!, endpoint with { Kind = EndpointKind.Binary, Transform = Transform.None }, output);
    }
}
