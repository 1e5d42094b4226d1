using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Visits;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>Computes the rows of an endpoint measured at repeated visits.</summary>
internal sealed class VisitsEvaluator : EndpointEvaluator
{
    private readonly VisitsDesign _design;
    private readonly PairRows _pairs;
    private readonly StrataRows _between;
    private readonly MixedModelResults _mixed;

    // Subjects whose samples a comparison of all visits, or the mixed model can use.
    private readonly StrataSets _complete;
    private readonly StrataSets _all;
    private readonly int[] _samples;

    public VisitsEvaluator(AnalysisPlan plan, VisitsDesign design)
        : base(plan)
    {
        Arrangement arrangement = plan.Arrangement;
        _design = design;
        _pairs = new PairRows(plan, design.AboveBelow, Scratch);
        _between = new StrataRows(arrangement.Strata.Length, plan.Options);
        _complete = StrataSets.Of(arrangement, set => arrangement.Places.All(place => place.Has(set)));
        _all = StrataSets.Of(arrangement);
        _samples = new int[_all.Codes.Length];
        for (int position = 0; position < _samples.Length; position++)
        {
            foreach (int subject in _all.SetsAt(position))
                _samples[position] += arrangement.Places.Count(place => place.Has(subject));
        }

        _mixed = new MixedModelResults(plan, design.Comparisons, _all.Codes.Length, Scratch);
    }

    private int Visits => _design.Times.Length;

    /// <inheritdoc/>
    protected override void AddRows(Span<double> values, EndpointInfo endpoint, BlockOutput output, out int undefined)
    {
        using Scratch.Frame frame = Scratch.Open();
        ReadOnlySpan<double> above = AboveLimit(values, endpoint, frame);
        int subjects = Plan.Arrangement.Sets.Length;
        Span<double> byVisit = frame.Doubles(Visits * subjects);
        for (int visit = 0; visit < Visits; visit++)
            Plan.Arrangement.Places[visit].Gather(values, byVisit.Slice(visit * subjects, subjects));
        if (endpoint.Kind == EndpointKind.Binary)
            MeanSigns.Round(byVisit);
        undefined = Transformed(endpoint.Transform, byVisit);
        Span<double> bySubject = frame.Doubles(byVisit.Length);
        for (int subject = 0; subject < subjects; subject++)
        {
            for (int visit = 0; visit < Visits; visit++)
                bySubject[subject * Visits + visit] = byVisit[visit * subjects + subject];
        }

        int describing = FirstWithMixedModel(endpoint.Kind);
        if (describing >= 0)
            FitMixedModel(bySubject);
        for (short comparison = 0; comparison < _design.Comparisons.Count; comparison++)
        {
            int rowsBefore = output.Rows.Count;
            int detailsBefore = output.Details.Count;
            AddComparison(comparison, comparison == describing, byVisit, bySubject, above, endpoint, output);
            foreach (ref ResultRow row in output.Rows.Records[rowsBefore..])
                row.Contrast = comparison;
            foreach (ref DetailRow detail in output.Details.Records[detailsBefore..])
                detail.Contrast = comparison;
        }
    }

    // The fit is common to all comparisons: its variances are given once, with the first that it makes.
    private int FirstWithMixedModel(EndpointKind kind)
    {
        for (int comparison = 0; comparison < _design.Comparisons.Count; comparison++)
        {
            foreach (PlannedVisitMethod planned in _design.MethodsFor(kind, comparison))
            {
                if (planned is { Visits.Test: null, Pairs: null })
                    return comparison;
            }
        }

        return -1;
    }

    private void FitMixedModel(ReadOnlySpan<double> bySubject)
    {
        for (int position = 0; position < _all.Codes.Length; position++)
        {
            using Scratch.Frame frame = Scratch.Open();
            ReadOnlySpan<int> subjects = _all.SetsAt(position);
            VisitSample sample = VisitSample.Of(Picked(bySubject, Visits, subjects, frame), _design.Times);
            if (_design.Covariates.Count > 0)
                sample = sample.WithCovariates(Picked(_design.Covariates.Values, Visits * _design.Covariates.Count, subjects, frame), _design.Covariates.Count);
            _mixed.Fit(position, sample, _samples[position]);
        }
    }

    private void AddComparison(
        short comparison, bool describes, ReadOnlySpan<double> byVisit, ReadOnlySpan<double> bySubject, ReadOnlySpan<double> above, EndpointInfo endpoint, BlockOutput output)
    {
        VisitComparison form = _design.Comparisons[comparison];
        PairContrast? pair = _design.Pairs[comparison];
        int subjects = Plan.Arrangement.Sets.Length;
        ReadOnlySpan<double> index = byVisit.Slice(form.Index * subjects, subjects);
        ReadOnlySpan<double> reference = byVisit.Slice(form.Reference * subjects, subjects);
        int before = output.Rows.Count;
        foreach (PlannedVisitMethod planned in _design.MethodsFor(endpoint.Kind, comparison))
        {
            if (planned.Pairs is { } method)
                _pairs.AddMethod(index, reference, pair!, _design.SeenAtBoth[comparison]!, method, endpoint, output);
            else if (planned.Visits!.Test is { } test)
                AddComplete(bySubject, planned, test, endpoint, output);
            else
                AddMixedModel(comparison, describes, planned, endpoint, output);
        }

        if (pair is not null && Plan.Flips is { } flips)
            _pairs.KeepDifferences(index, reference, pair, _design.SeenAtBoth[comparison]!, comparison, _design.MethodsFor(endpoint.Kind, comparison)[0].Pairs!.Method.Flips!, flips, output);
        if (pair is not null && endpoint.Kind == EndpointKind.Binary)
            PairDetails.Add(index, reference, pair, endpoint, _design.SeenAtBoth[comparison]!, Plan, output.Details, Scratch);
        if (Plan.Study.Endpoints.PerStandardDeviation && endpoint.Kind == EndpointKind.Continuous && form.Form != VisitForms.Omnibus)
            StandardScale.Apply(byVisit.Slice(_design.Reference * subjects, subjects), output.Rows.Records[before..], Scratch);
        if (pair is not null && !above.IsEmpty)
            _pairs.AddAboveBelow(above, pair, _design.SeenAtBoth[comparison]!, endpoint, before, output);
    }

    private void AddComplete(ReadOnlySpan<double> bySubject, PlannedVisitMethod planned, VisitTest test, EndpointInfo endpoint, BlockOutput output)
    {
        int before = output.Rows.Count;
        _between.Clear();
        for (int position = 0; position < _complete.Codes.Length; position++)
        {
            using Scratch.Frame frame = Scratch.Open();
            ReadOnlySpan<int> designed = _complete.SetsAt(position);
            VisitSample sample = VisitSample.Of(Picked(bySubject, Visits, designed, frame), _design.Times).Complete(frame);
            TestResult result = UntestedBefore(designed.Length, sample.Subjects, sample.Values.Length) ?? test(sample, Plan.Options, Scratch);
            AddRow(_complete.Codes[position], designed.Length - sample.Subjects, result, endpoint, output);
            if (result.Outcome == Outcome.Tested && planned.Visits!.Extra is { } extra)
                extra(sample, Scratch, new DetailSink(output, 0, _complete.Codes[position], planned.Code));
        }

        Finish(before, planned, planned.Visits!.Strata, endpoint, _design.Covariates.Count > 0 ? Remarks.Unadjusted : Remarks.None, output);
    }

    private void AddMixedModel(short comparison, bool describes, PlannedVisitMethod planned, EndpointInfo endpoint, BlockOutput output)
    {
        int before = output.Rows.Count;
        _between.Clear();
        for (int position = 0; position < _all.Codes.Length; position++)
        {
            TestResult result = _mixed[position, comparison];
            AddRow(_all.Codes[position], _all.SetsAt(position).Length - result.Sets, result, endpoint, output);
            if (describes)
                _mixed.AddComponents(position, new DetailSink(output, 0, _all.Codes[position], planned.Code));
        }

        // All visits at once have no estimate that strata could be compared by.
        StrataComparison strata = _design.Comparisons[comparison].Form == VisitForms.Omnibus ? StrataComparison.None : planned.Visits!.Strata;
        Finish(before, planned, strata, endpoint, Remarks.None, output);
    }

    private void AddRow(short stratum, int missing, in TestResult result, EndpointInfo endpoint, BlockOutput output)
    {
        ref ResultRow row = ref output.Rows.Add();
        row.Stratum = stratum;
        row.Missing = missing;
        row.Take(result);
        if (_all.Comparable && stratum != ResultRow.AllStrata)
            _between.Keep(stratum, result);
    }

    private void Finish(int before, PlannedVisitMethod planned, StrataComparison strata, EndpointInfo endpoint, Remarks remarks, BlockOutput output)
    {
        if (_all.Comparable && strata != StrataComparison.None)
            _between.Fill(strata, ref output.Rows.Add());
        foreach (ref ResultRow row in output.Rows.Records[before..])
        {
            row.Method = planned.Code;
            row.Primary = planned.IsPrimary ? (short)1 : (short)0;
            row.LogBase = (short)EstimateLogBase.Of(EstimateScale.Analysis, endpoint.Transform);
            row.Remarks |= remarks;
        }
    }

    private static Span<double> Picked(ReadOnlySpan<double> table, int width, ReadOnlySpan<int> subjects, in Scratch.Frame frame)
    {
        Span<double> picked = frame.Doubles(subjects.Length * width);
        for (int i = 0; i < subjects.Length; i++)
            table.Slice(subjects[i] * width, width).CopyTo(picked[(i * width)..]);
        return picked;
    }
}
