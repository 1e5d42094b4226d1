using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>Computes the rows of an endpoint measured on the members of matched sets.</summary>
internal sealed class SetsEvaluator : EndpointEvaluator
{
    private readonly SetsDesign _design;
    private readonly StrataRows[] _between;
    private readonly int _rowsOfMethod;

    public SetsEvaluator(AnalysisPlan plan, SetsDesign design)
        : base(plan)
    {
        int strata = plan.Arrangement.Strata.Length;
        _design = design;
        _between = [.. Enumerable.Range(0, design.MostMethods).Select(_ => new StrataRows(strata, plan.Options))];
        _rowsOfMethod = design.Parts.Length + (strata > 1 ? 1 : 0);
    }

    /// <inheritdoc/>
    protected override void AddRows(Span<double> values, EndpointInfo endpoint, BlockOutput output, out int undefined)
    {
        using Scratch.Frame frame = Scratch.Open();
        Span<double> members = frame.Doubles(_design.Layout.Count);
        Span<double> above = endpoint is { Kind: EndpointKind.Continuous, DetectionLimit: not null } ? frame.Doubles(members.Length) : [];
        if (!above.IsEmpty)
            TakeLimit(endpoint.DetectionLimit!.Value, values, above);
        _design.Layout.Values.Gather(values, members);
        if (endpoint.Kind == EndpointKind.Binary)
            MeanSigns.Round(members);
        undefined = Transformed(endpoint.Transform, members);
        Transform scale = endpoint.Transform;
        Outcome outcome = Outcome.Tested;
        if (Plan.Study.Endpoints.PerStandardDeviation && endpoint.Kind == EndpointKind.Continuous)
        {
            scale = Transform.None;
            outcome = Standardised(members, output);
        }

        int before = output.Rows.Count;
        AddMethods(members, _design.MethodsFor(endpoint.Kind), scale, outcome, output);
        if (Plan.Flips is { } flips)
            KeepValues(members, flips, output);
        if (!above.IsEmpty)
            AddAboveBelow(above, before, output);
    }

    // What labels are exchanged over: every member's value, missing or not.
    private void KeepValues(ReadOnlySpan<double> members, FlipPlan flips, BlockOutput output)
    {
        foreach (SetPart part in _design.Parts)
        {
            FlipSection section = flips.Section(0, part.Stratum)!;
            Span<double> kept = output.Differences.Row.Slice(section.Offset, section.Sets);
            for (int i = 0; i < kept.Length; i++)
                kept[i] = members[part.Members[i]];
        }
    }

    // One value a member: 1 where the measured value is at or above the limit.
    private void TakeLimit(double limit, Span<double> values, Span<double> above)
    {
        using Scratch.Frame frame = Scratch.Open();
        Span<double> aboveBySample = frame.Doubles(values.Length);
        BelowLimitRule.Above(limit, values, aboveBySample);
        _design.Layout.Values.Gather(aboveBySample, above);
        BelowLimitRule.Apply(Plan.Study.Endpoints.BelowLimit, limit, values);
    }

    private Outcome Standardised(Span<double> members, BlockOutput output)
    {
        using Scratch.Frame frame = Scratch.Open();
        double deviation = StandardScale.DeviationOf(TakeRole(false, members, frame.Doubles(members.Length)), Scratch);
        new DetailSink(output, 0, ResultRow.AllStrata, DetailRow.NoMethod).Add(Quantity.ReferenceSd, deviation);
        if (!(deviation > 0))
            return Outcome.NoReferenceSpread;
        foreach (ref double value in members)
            value /= deviation;
        return Outcome.Tested;
    }

    private Span<double> TakeRole(bool index, ReadOnlySpan<double> members, Span<double> taken)
    {
        int count = 0;
        for (int member = 0; member < members.Length; member++)
        {
            if (_design.Layout.IsIndex[member] == index)
                taken[count++] = members[member];
        }

        return taken[..count];
    }

    // Method by method, within it all sets, each stratum, the comparison between strata; a part's sets are taken once.
    private void AddMethods(ReadOnlySpan<double> members, ReadOnlySpan<PlannedSetMethod> methods, Transform scale, Outcome outcome, BlockOutput output)
    {
        int first = output.Rows.Count;
        for (int i = 0; i < methods.Length * _rowsOfMethod; i++)
            output.Rows.Add();
        for (int method = 0; method < methods.Length; method++)
            _between[method].Clear();
        for (int part = 0; part < _design.Parts.Length; part++)
            FillPart(members, _design.Parts[part], methods, outcome, output, first + part);
        for (int method = 0; method < methods.Length; method++)
        {
            Span<ResultRow> rows = output.Rows.Records.Slice(first + (method * _rowsOfMethod), _rowsOfMethod);
            if (_rowsOfMethod > _design.Parts.Length)
                _between[method].Fill(methods[method].Method.Strata, ref rows[^1]);
            foreach (ref ResultRow row in rows)
            {
                row.Method = methods[method].Code;
                row.Primary = methods[method].IsPrimary ? (short)1 : (short)0;
                row.LogBase = (short)EstimateLogBase.Of(methods[method].Method.Scale, scale);
                row.Remarks |= _design.Remarks;
            }
        }
    }

    private void FillPart(
        ReadOnlySpan<double> members, SetPart part, ReadOnlySpan<PlannedSetMethod> methods, Outcome outcome, BlockOutput output, int firstRow)
    {
        using Scratch.Frame frame = Scratch.Open();
        SetSample sets = Take(members, part, frame);
        TestResult? untested = outcome != Outcome.Tested
            ? TestResult.Untested(outcome, sets.Sets, sets.Members)
            : UntestedBefore(part.Sets, sets.Sets, sets.Members);
        for (int method = 0; method < methods.Length; method++)
        {
            var details = new DetailSink(output, 0, part.Stratum, methods[method].Code);
            TestResult result = untested ?? methods[method].Method.Test(sets, Plan.Options, Scratch, details);
            ref ResultRow row = ref output.Rows.Records[firstRow + (method * _rowsOfMethod)];
            row.Stratum = part.Stratum;
            row.Missing = part.Sets - sets.Sets;
            row.Take(result);
            if (part.Stratum != ResultRow.AllStrata)
                _between[method].Keep(part.Stratum, result);
            if (result.Outcome != Outcome.Tested)
                continue;
            foreach (SetExtra extra in methods[method].Extras.Span)
                extra(sets, Plan.Options, Scratch, details);
        }
    }

    // An endpoint that everybody has is taken as it lies; else members and sets that lack something leave.
    private static SetSample Take(ReadOnlySpan<double> members, SetPart part, in Scratch.Frame frame)
    {
        Span<double> values = frame.Doubles(part.Members.Length);
        bool complete = part.CovariatesKnown;
        for (int i = 0; i < values.Length; i++)
        {
            values[i] = members[part.Members[i]];
            complete &= !double.IsNaN(values[i]);
        }

        return complete
            ? SetSample.OfComplete(values, part.Starts, part.IndexCounts, part.Covariates)
            : SetSample.Of(values, part.Starts, part.IsIndex, part.Covariates, frame);
    }

    // Counts per role; where most values lie below the limit, the rows say so and above against below is tested beside them.
    private void AddAboveBelow(Span<double> above, int rowsBefore, BlockOutput output)
    {
        using Scratch.Frame frame = Scratch.Open();
        MeanSigns.Round(above);
        var (below, known) = BelowCount.Of(above);
        int belowIndex = BelowCount.Of(TakeRole(true, above, frame.Doubles(above.Length))).Below;
        var details = new DetailSink(output, 0, ResultRow.AllStrata, DetailRow.NoMethod);
        details.Add(Quantity.IndexBelowLimit, belowIndex);
        details.Add(Quantity.ReferenceBelowLimit, below - belowIndex);
        if (2 * below <= known)
            return;
        foreach (ref ResultRow row in output.Rows.Records[rowsBefore..])
            row.Remarks |= Remarks.MostlyBelowLimit;
        AddMethods(above, _design.AboveBelow, Transform.None, Outcome.Tested, output);
    }
}
