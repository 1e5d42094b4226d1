using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>Computes the rows of an endpoint measured on pairs, or on two visits of the same people.</summary>
internal sealed class PairsEvaluator : EndpointEvaluator
{
    private readonly PairsDesign _design;
    private readonly StrataSets _strata;
    private readonly StrataRows _between;

    public PairsEvaluator(AnalysisPlan plan, PairsDesign design)
        : base(plan)
    {
        _design = design;
        _strata = StrataSets.Of(plan.Arrangement);
        _between = new StrataRows(plan.Arrangement.Strata.Length, plan.Options);
    }

    /// <inheritdoc/>
    protected override void AddRows(Span<double> values, EndpointInfo endpoint, BlockOutput output, out int undefined)
    {
        using Scratch.Frame frame = Scratch.Open();
        double? detection = endpoint.Kind == EndpointKind.Continuous ? endpoint.DetectionLimit : null;
        Span<double> above = detection is null ? [] : frame.Doubles(values.Length);
        if (detection is { } limit)
        {
            BelowLimitRule.Above(limit, values, above);
            BelowLimitRule.Apply(Plan.Study.Endpoints.BelowLimit, limit, values);
        }

        undefined = 0;
        for (short contrast = 0; contrast < _design.Comparisons.Count; contrast++)
        {
            int rowsBefore = output.Rows.Count;
            int detailsBefore = output.Details.Count;
            undefined += AddContrast(values, above, endpoint, contrast, output);
            foreach (ref ResultRow row in output.Rows.Records[rowsBefore..])
                row.Contrast = contrast;
            foreach (ref DetailRow detail in output.Details.Records[detailsBefore..])
                detail.Contrast = contrast;
        }
    }

    private int AddContrast(ReadOnlySpan<double> values, ReadOnlySpan<double> above, EndpointInfo endpoint, short contrast, BlockOutput output)
    {
        using Scratch.Frame frame = Scratch.Open();
        PairContrast places = _design.Comparisons[contrast];
        Span<double> both = frame.Doubles(2 * places.Index.Sets);
        Span<double> index = both[..places.Index.Sets];
        Span<double> reference = both[places.Index.Sets..];
        places.Index.Gather(values, index);
        places.Reference.Gather(values, reference);
        if (endpoint.Kind == EndpointKind.Binary)
            MeanSigns.Round(both);
        int undefined = Transformed(endpoint.Transform, both);
        int before = output.Rows.Count;
        foreach (PlannedMethod planned in _design.MethodsFor(endpoint.Kind))
            AddMethod(index, reference, places, planned, endpoint, output);
        if (Plan.Flips is { } flips)
            KeepDifferences(index, reference, places, contrast, endpoint.Kind, flips, output);
        PairDetails.Add(index, reference, places, endpoint, _strata, Plan, output.Details, Scratch);
        if (Plan.Study.Endpoints.PerStandardDeviation && endpoint.Kind == EndpointKind.Continuous)
            StandardScale.Apply(reference, output.Rows.Records[before..], Scratch);
        if (!above.IsEmpty)
            AddAboveBelow(above, places, endpoint, before, output);
        return undefined;
    }

    // All sets first, then each stratum, then the comparison between strata.
    private void AddMethod(
        ReadOnlySpan<double> index, ReadOnlySpan<double> reference, PairContrast places, PlannedMethod planned, EndpointInfo endpoint, BlockOutput output)
    {
        CovariateUse covariates = places.Columns.Covariates.Length == 0 ? CovariateUse.Ignored : planned.Method.Covariates;
        LogBase logBase = EstimateLogBase.Of(planned.Method.Scale, endpoint.Transform);
        Remarks unadjusted = places.Columns.Covariates.Length > 0 && covariates == CovariateUse.Ignored ? Remarks.Unadjusted : Remarks.None;
        int before = output.Rows.Count;
        _between.Clear();
        for (short stratum = ResultRow.AllStrata; stratum < _strata.Count; stratum++)
        {
            using Scratch.Frame frame = Scratch.Open();
            CompletePairs pairs = CompletePairs.Of(index, reference, _strata.SetsOf(stratum), places.Columns, covariates, Plan.Study.Analysis.Zeros, frame);
            TestResult result = UntestedBefore(pairs.Designed, pairs.Count, 2 * pairs.Count) ?? planned.Method.Test(pairs.Input, Plan.Options, Scratch);
            ref ResultRow row = ref output.Rows.Add();
            row.Stratum = stratum;
            row.Missing = pairs.Designed - pairs.Count;
            row.Take(result);
            if (stratum != ResultRow.AllStrata)
                _between.Keep(stratum, result, pairs.Input.Pairs, endpoint.Kind);
        }

        if (_strata.Count > 1 && planned.Method.Strata != StrataComparison.None)
            _between.Fill(planned.Method.Strata, ref output.Rows.Add());
        foreach (ref ResultRow row in output.Rows.Records[before..])
        {
            row.Method = planned.Code;
            row.Primary = planned.IsPrimary ? (short)1 : (short)0;
            row.LogBase = (short)logBase;
            row.Remarks |= unadjusted;
        }
    }

    // What the primary method flips; its untested rows are no hypotheses, whatever is kept of them.
    private void KeepDifferences(
        ReadOnlySpan<double> index, ReadOnlySpan<double> reference, PairContrast places, short contrast, EndpointKind kind, FlipPlan plan, BlockOutput output)
    {
        FlipRule rule = _design.MethodsFor(kind)[0].Method.Flips!;
        foreach (FlipSection section in plan.Sections)
        {
            if (section.Contrast != contrast)
                continue;
            using Scratch.Frame frame = Scratch.Open();
            CompletePairs pairs = CompletePairs.Of(
                index, reference, _strata.SetsOf(section.Stratum), places.Columns, CovariateUse.Ignored, Plan.Study.Analysis.Zeros, frame);
            Span<double> scores = frame.Doubles(pairs.Count);
            rule.Scores(pairs.Input.Pairs, scores, Scratch);
            Span<double> kept = output.Differences.Row.Slice(section.Offset, section.Sets);
            for (int pair = 0; pair < pairs.Count; pair++)
                kept[pairs.Places[pair]] = scores[pair];
        }
    }

    // Counts per role; where most values lie below the limit, the rows say so and above against below is tested beside them.
    private void AddAboveBelow(ReadOnlySpan<double> above, PairContrast places, EndpointInfo endpoint, int rowsBefore, BlockOutput output)
    {
        using Scratch.Frame frame = Scratch.Open();
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
        AddMethod(index, reference, places, _design.AboveBelow!, endpoint with { Kind = EndpointKind.Binary, Transform = Transform.None }, output);
    }
}
