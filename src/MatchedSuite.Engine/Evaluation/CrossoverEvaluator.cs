using System.Runtime.InteropServices;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Crossover;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>Computes the rows of an endpoint of a crossover.</summary>
internal sealed class CrossoverEvaluator : EndpointEvaluator
{
    private readonly CrossoverDesign _design;
    private readonly StrataSets _strata;
    private readonly StrataRows _between;

    public CrossoverEvaluator(AnalysisPlan plan, CrossoverDesign design)
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
        AboveLimit(values, endpoint, frame);
        int subjects = Plan.Arrangement.Sets.Length;
        Span<double> both = frame.Doubles(2 * subjects);
        Plan.Arrangement.Places[0].Gather(values, both[..subjects]);
        Plan.Arrangement.Places[1].Gather(values, both[subjects..]);
        if (endpoint.Kind == EndpointKind.Binary)
            MeanSigns.Round(both);
        undefined = Transformed(endpoint.Transform, both);
        int before = output.Rows.Count;
        foreach (PlannedCrossoverMethod planned in _design.MethodsFor(endpoint.Kind))
            AddMethod(both[..subjects], both[subjects..], planned, endpoint, output);
        if (Plan.Study.Endpoints.PerStandardDeviation && endpoint.Kind == EndpointKind.Continuous)
            StandardScale.Apply(UnderReference(both, frame), output.Rows.Records[before..], Scratch);
    }

    private void AddMethod(
        ReadOnlySpan<double> first, ReadOnlySpan<double> second, PlannedCrossoverMethod planned, EndpointInfo endpoint, BlockOutput output)
    {
        int before = output.Rows.Count;
        _between.Clear();
        for (int position = 0; position < _strata.Codes.Length; position++)
        {
            using Scratch.Frame frame = Scratch.Open();
            ReadOnlySpan<int> designed = _strata.SetsAt(position);
            CrossoverSample sample = SampleOf(first, second, designed, frame);
            TestResult result = UntestedBefore(designed.Length, sample.Count, 2 * sample.Count) ?? planned.Method.Test(sample, Plan.Options, Scratch);
            ref ResultRow row = ref output.Rows.Add();
            row.Stratum = _strata.Codes[position];
            row.Missing = designed.Length - sample.Count;
            row.Take(result);
            if (_strata.Comparable && row.Stratum != ResultRow.AllStrata)
                _between.Keep(row.Stratum, result);
            if (row.IsTested && planned.Method.Extra is { } extra)
                extra(sample, Plan.Options, Scratch, new DetailSink(output, 0, row.Stratum, planned.Code));
        }

        if (_strata.Comparable)
            _between.Fill(planned.Method.Strata, ref output.Rows.Add());
        Remarks unadjusted = Plan.Study.Design.Covariates.Count > 0 ? Remarks.Unadjusted : Remarks.None;
        foreach (ref ResultRow row in output.Rows.Records[before..])
        {
            row.Method = planned.Code;
            row.Primary = planned.IsPrimary ? (short)1 : (short)0;
            row.LogBase = (short)EstimateLogBase.Of(planned.Method.Scale, endpoint.Transform);
            row.Remarks |= unadjusted;
        }
    }

    private CrossoverSample SampleOf(ReadOnlySpan<double> first, ReadOnlySpan<double> second, ReadOnlySpan<int> subjects, in Scratch.Frame frame)
    {
        Span<double> one = frame.Doubles(subjects.Length);
        Span<double> two = frame.Doubles(subjects.Length);
        Span<TreatmentSequence> sequences = MemoryMarshal.Cast<int, TreatmentSequence>(frame.Integers(subjects.Length));
        for (int i = 0; i < subjects.Length; i++)
        {
            one[i] = first[subjects[i]];
            two[i] = second[subjects[i]];
            sequences[i] = _design.Sequences[subjects[i]];
        }

        return CrossoverSample.Of(one, two, sequences, frame);
    }

    private Span<double> UnderReference(ReadOnlySpan<double> both, in Scratch.Frame frame)
    {
        int subjects = _design.Sequences.Length;
        Span<double> values = frame.Doubles(subjects);
        for (int subject = 0; subject < subjects; subject++)
            values[subject] = both[_design.Sequences[subject] == TreatmentSequence.IndexFirst ? subjects + subject : subject];
        return values;
    }
}
