using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>Computes the rows of an endpoint measured on pairs, or on two visits of the same people.</summary>
internal sealed class PairsEvaluator(AnalysisPlan plan, PairsDesign design) : EndpointEvaluator(plan)
{
    /// <inheritdoc/>
    protected override void AddRows(Span<double> values, EndpointInfo endpoint, BlockOutput output, out int undefined)
    {
        undefined = 0;
        for (short contrast = 0; contrast < design.Comparisons.Count; contrast++)
        {
            PairContrast places = design.Comparisons[contrast];
            using Scratch.Frame frame = Scratch.Open();
            Span<double> index = frame.Doubles(places.Index.Sets);
            Span<double> reference = frame.Doubles(places.Index.Sets);
            places.Index.Gather(values, index);
            places.Reference.Gather(values, reference);
            undefined += ValueTransform.Apply(endpoint.Transform, index) + ValueTransform.Apply(endpoint.Transform, reference);
            int before = output.Rows.Count;
            AddRows(index, reference, endpoint, ResultRow.AllStrata, output);
            for (short stratum = 0; stratum < Plan.Arrangement.Strata.Length; stratum++)
                AddRows(index, reference, endpoint, stratum, output);
            foreach (ref ResultRow row in output.Rows.Records[before..])
                row.Contrast = contrast;
        }
    }

    private void AddRows(
        ReadOnlySpan<double> index, ReadOnlySpan<double> reference, EndpointInfo endpoint, short stratum, BlockOutput output)
    {
        using Scratch.Frame frame = Scratch.Open();
        Span<double> completeIndex = frame.Doubles(index.Length);
        Span<double> completeReference = frame.Doubles(index.Length);
        ReadOnlySpan<int> stratumOfSet = Plan.Arrangement.StratumOfSet;
        int designed = 0;
        int complete = 0;
        for (int set = 0; set < index.Length; set++)
        {
            if (stratum != ResultRow.AllStrata && stratumOfSet[set] != stratum)
                continue;
            designed++;
            if (double.IsNaN(index[set]) || double.IsNaN(reference[set]))
                continue;
            completeIndex[complete] = index[set];
            completeReference[complete] = reference[set];
            complete++;
        }

        TestResult? untested = UntestedBefore(designed, complete, 2 * complete);
        PairSample pairs = PairSample.Of(completeIndex[..complete], completeReference[..complete], frame);
        foreach (PlannedMethod planned in design.MethodsFor(endpoint.Kind))
        {
            ref ResultRow row = ref output.Rows.Add();
            row.Stratum = stratum;
            row.Method = planned.Code;
            row.Primary = planned.IsPrimary ? (short)1 : (short)0;
            row.LogBase = (short)EstimateLogBase.Of(planned.Method.Scale, endpoint.Transform);
            row.Missing = designed - complete;
            row.Take(untested ?? planned.Method.Test(pairs, Plan.Options, Scratch));
        }
    }
}
