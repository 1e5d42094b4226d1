using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>Computes the rows of an endpoint measured on pairs, or with two samples of the same person.</summary>
internal sealed class PairsEvaluator : EndpointEvaluator
{
    private readonly PairsDesign _design;
    private readonly StrataSets _strata;
    private readonly PairRows _rows;

    public PairsEvaluator(AnalysisPlan plan, PairsDesign design)
        : base(plan)
    {
        _design = design;
        _strata = StrataSets.Of(plan.Arrangement);
        _rows = new PairRows(plan, design.AboveBelow, Scratch);
    }

    /// <inheritdoc/>
    protected override void AddRows(Span<double> values, EndpointInfo endpoint, BlockOutput output, out int undefined)
    {
        using Scratch.Frame frame = Scratch.Open();
        ReadOnlySpan<double> above = AboveLimit(values, endpoint, frame);
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
            _rows.AddMethod(index, reference, places, _strata, planned, endpoint, output);
        if (Plan.Flips is { } flips)
            _rows.KeepDifferences(index, reference, places, _strata, contrast, _design.MethodsFor(endpoint.Kind)[0].Method.Flips!, flips, output);
        PairDetails.Add(index, reference, places, endpoint, _strata, Plan, output.Details, Scratch);
        if (Plan.Study.Endpoints.PerStandardDeviation && endpoint.Kind == EndpointKind.Continuous)
            StandardScale.Apply(reference, output.Rows.Records[before..], Scratch);
        if (!above.IsEmpty)
            _rows.AddAboveBelow(above, places, _strata, endpoint, before, output);
        return undefined;
    }
}
