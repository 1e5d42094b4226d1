using System.Runtime.InteropServices;
using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Arms;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;
using MatchedSuite.Study.Matching;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>Computes the rows of an endpoint whose change is compared between arms.</summary>
internal sealed class ArmsEvaluator : EndpointEvaluator
{
    private readonly ArmsDesign _design;
    private readonly PairRows _pairs;
    private readonly StrataRows _between;
    private readonly StrataSets[] _byArm;

    public ArmsEvaluator(AnalysisPlan plan, ArmsDesign design)
        : base(plan)
    {
        Arrangement arrangement = plan.Arrangement;
        _design = design;
        _pairs = new PairRows(plan, null, Scratch);
        _between = new StrataRows(arrangement.Strata.Length, plan.Options);
        _byArm = [.. design.Comparisons.Select(comparison => StrataSets.OfGroups(arrangement, subject => design.IsSeenAtBoth(subject, comparison, arrangement)))];
    }

    /// <inheritdoc/>
    protected override void AddRows(Span<double> values, EndpointInfo endpoint, BlockOutput output, out int undefined)
    {
        using Scratch.Frame frame = Scratch.Open();
        AboveLimit(values, endpoint, frame);
        int subjects = Plan.Arrangement.Sets.Length;
        Span<double> byVisit = frame.Doubles(Plan.Arrangement.Places.Length * subjects);
        for (int visit = 0; visit < Plan.Arrangement.Places.Length; visit++)
            Plan.Arrangement.Places[visit].Gather(values, byVisit.Slice(visit * subjects, subjects));
        undefined = Transformed(endpoint.Transform, byVisit);
        ReadOnlySpan<double> baseline = byVisit.Slice(_design.Baseline * subjects, subjects);
        for (int comparison = 0; comparison < _design.Comparisons.Count; comparison++)
        {
            int before = output.Rows.Count;
            int followUp = _design.Comparisons[comparison].FollowUp;
            AddBetweenArms(comparison, byVisit.Slice(followUp * subjects, subjects), baseline, endpoint, output);
            if (Plan.Flips is { } flips)
                KeepChanges(comparison, byVisit.Slice(followUp * subjects, subjects), baseline, flips, output);
            AddWithinArms(comparison, byVisit.Slice(followUp * subjects, subjects), baseline, endpoint, output);
            if (Plan.Study.Endpoints.PerStandardDeviation && endpoint.Kind == EndpointKind.Continuous)
                StandardScale.Apply(baseline, output.Rows.Records[before..], Scratch);
        }
    }

    private void AddBetweenArms(int comparison, ReadOnlySpan<double> followUp, ReadOnlySpan<double> baseline, EndpointInfo endpoint, BlockOutput output)
    {
        int before = output.Rows.Count;
        StrataSets strata = _design.SeenAtBoth[comparison];
        short contrast = _design.Comparisons[comparison].BetweenArms;
        foreach (PlannedArmMethod planned in _design.BetweenArms(endpoint.Kind))
        {
            int first = output.Rows.Count;
            _between.Clear();
            for (int position = 0; position < strata.Codes.Length; position++)
            {
                using Scratch.Frame frame = Scratch.Open();
                ReadOnlySpan<int> designed = strata.SetsAt(position);
                ArmSample sample = SampleOf(followUp, baseline, designed, frame);
                TestResult result = UntestedBefore(designed.Length, sample.Count, 2 * sample.Count) ?? planned.Method.Test(sample, Plan.Options, Scratch);
                ref ResultRow row = ref output.Rows.Add();
                row.Stratum = strata.Codes[position];
                row.Missing = designed.Length - sample.Count;
                row.Take(result);
                if (strata.Comparable && row.Stratum != ResultRow.AllStrata)
                    _between.Keep(row.Stratum, result);
                if (planned.IsPrimary && endpoint.Kind == EndpointKind.Continuous)
                    AddBaseline(sample, new DetailSink(output, contrast, row.Stratum, DetailRow.NoMethod));
            }

            if (strata.Comparable)
                _between.Fill(planned.Method.Strata, ref output.Rows.Add());
            foreach (ref ResultRow row in output.Rows.Records[first..])
            {
                row.Method = planned.Code;
                row.Primary = planned.IsPrimary ? (short)1 : (short)0;
            }
        }

        Remarks unadjusted = Plan.Study.Design.Covariates.Count > 0 ? Remarks.Unadjusted : Remarks.None;
        foreach (ref ResultRow row in output.Rows.Records[before..])
        {
            row.Contrast = contrast;
            row.LogBase = (short)EstimateLogBase.Of(EstimateScale.Analysis, endpoint.Transform);
            row.Remarks |= unadjusted;
        }
    }

    // Changes on the analysis scale, whose labels are the arms; a subject without a change stays missing.
    private void KeepChanges(int comparison, ReadOnlySpan<double> followUp, ReadOnlySpan<double> baseline, FlipPlan flips, BlockOutput output)
    {
        StrataSets strata = _design.SeenAtBoth[comparison];
        for (int position = 0; position < strata.Codes.Length; position++)
        {
            FlipSection section = flips.Section(_design.Comparisons[comparison].BetweenArms, strata.Codes[position])!;
            ReadOnlySpan<int> designed = strata.SetsAt(position);
            Span<double> kept = output.Differences.Row.Slice(section.Offset, section.Sets);
            for (int i = 0; i < kept.Length; i++)
                kept[i] = followUp[designed[i]] - baseline[designed[i]];
        }
    }

    private void AddWithinArms(int comparison, ReadOnlySpan<double> followUp, ReadOnlySpan<double> baseline, EndpointInfo endpoint, BlockOutput output)
    {
        int before = output.Rows.Count;
        foreach (PlannedMethod planned in _design.WithinArms(endpoint.Kind))
            _pairs.AddMethod(followUp, baseline, _design.Comparisons[comparison].WithinArms, _byArm[comparison], planned, endpoint, output);
        foreach (ref ResultRow row in output.Rows.Records[before..])
            row.Contrast = _design.Comparisons[comparison].Within;
    }

    private ArmSample SampleOf(ReadOnlySpan<double> followUp, ReadOnlySpan<double> baseline, ReadOnlySpan<int> subjects, in Scratch.Frame frame)
    {
        Span<double> before = frame.Doubles(subjects.Length);
        Span<double> after = frame.Doubles(subjects.Length);
        Span<Arm> arms = MemoryMarshal.Cast<int, Arm>(frame.Integers(subjects.Length));
        for (int i = 0; i < subjects.Length; i++)
        {
            before[i] = baseline[subjects[i]];
            after[i] = followUp[subjects[i]];
            arms[i] = _design.Arms[subjects[i]];
        }

        return ArmSample.Of(before, after, arms, frame);
    }

    // How the arms compare before treatment, on the subjects that the comparison uses.
    private void AddBaseline(in ArmSample sample, DetailSink details)
    {
        if (sample.IndexCount < 2 || sample.ReferenceCount < 2)
            return;
        var (indexMean, indexSd) = MeanAndDeviation.Of(sample.Pairs.Reference[..sample.IndexCount], Scratch);
        var (referenceMean, referenceSd) = MeanAndDeviation.Of(sample.Pairs.Reference[sample.IndexCount..], Scratch);
        details.Add(Quantity.BaselineIndexMean, indexMean);
        details.Add(Quantity.BaselineIndexSd, indexSd);
        details.Add(Quantity.BaselineReferenceMean, referenceMean);
        details.Add(Quantity.BaselineReferenceSd, referenceSd);
        double spread = Math.Sqrt(((indexSd * indexSd) + (referenceSd * referenceSd)) / 2);
        if (spread > 0)
            details.Add(Quantity.BaselineStandardisedDifference, (indexMean - referenceMean) / spread);
        ChangeAncovaFit fit = ChangeAncova.Fit(sample, Scratch);
        if (fit.Outcome == Outcome.Tested)
            details.Add(Quantity.BaselineSlope, fit.BaselineSlope);
    }
}
