using MatchedSuite.Engine.Methods;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;
using MatchedSuite.Statistics.Twins;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>The numbers beside the results of pairs: risk differences of binary endpoints, likeness of twins.</summary>
internal static class PairDetails
{
    /// <summary>Adds what applies to the endpoint.</summary>
    public static void Add(
        ReadOnlySpan<double> index, ReadOnlySpan<double> reference, PairContrast places, EndpointInfo endpoint, StrataSets strata, AnalysisPlan plan,
        RecordBuffer<DetailRow> details, Scratch scratch)
    {
        bool isTwins = plan.Study.Design.Kind == DesignKind.Pairs && endpoint.Kind == EndpointKind.Continuous && TwinStrata.Are(plan.Arrangement.Strata);
        if (endpoint.Kind != EndpointKind.Binary && !isTwins)
            return;
        for (int position = 0; position < strata.Codes.Length; position++)
        {
            short stratum = strata.Codes[position];
            using Scratch.Frame frame = scratch.Open();
            CompletePairs pairs = CompletePairs.Of(
                index, reference, strata.SetsAt(position), places.Columns, CovariateUse.Ignored, plan.Study.Analysis.Zeros, frame);
            if (endpoint.Kind == EndpointKind.Binary && pairs.Count > 0)
                AddRisks(PairedTable.Of(pairs.Input.Pairs), stratum, plan.Options, details);
            else if (isTwins && stratum != ResultRow.AllStrata)
                AddLikeness(IntraclassCorrelation.Of(pairs.Input.Pairs, plan.Options, scratch), stratum, details);
        }
    }

    /// <summary>Adds one number about the endpoint itself.</summary>
    public static void AddNumber(RecordBuffer<DetailRow> details, short stratum, Quantity quantity, double value)
    {
        ref DetailRow detail = ref details.Add();
        detail.Stratum = stratum;
        detail.Method = DetailRow.NoMethod;
        detail.Quantity = quantity;
        detail.Value = value;
    }

    private static void AddRisks(in PairedTable table, short stratum, TestOptions options, RecordBuffer<DetailRow> details)
    {
        AddNumber(details, stratum, Quantity.PairsBoth, table.Both);
        AddNumber(details, stratum, Quantity.PairsIndexOnly, table.IndexOnly);
        AddNumber(details, stratum, Quantity.PairsReferenceOnly, table.ReferenceOnly);
        AddNumber(details, stratum, Quantity.PairsNeither, table.Neither);
        AddNumber(details, stratum, Quantity.RiskDifference, RiskDifference.Of(table));
        AddInterval(details, stratum, (Quantity.RiskDifferenceLow, Quantity.RiskDifferenceHigh), RiskDifference.SquareAndAdd(table, options));
        AddInterval(details, stratum, (Quantity.RiskDifferenceScoreLow, Quantity.RiskDifferenceScoreHigh), RiskDifference.Score(table, options));
    }

    private static void AddLikeness(in IntraclassResult likeness, short stratum, RecordBuffer<DetailRow> details)
    {
        if (likeness.Outcome != Outcome.Tested)
            return;
        AddNumber(details, stratum, Quantity.IntraclassCorrelation, likeness.Estimate);
        AddInterval(details, stratum, (Quantity.IntraclassCorrelationLow, Quantity.IntraclassCorrelationHigh), likeness.Interval);
    }

    private static void AddInterval(RecordBuffer<DetailRow> details, short stratum, (Quantity Low, Quantity High) ends, Interval interval)
    {
        AddNumber(details, stratum, ends.Low, interval.Low);
        AddNumber(details, stratum, ends.High, interval.High);
    }
}
