using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Statistics;
using MatchedSuite.Study.Definition;
using MatchedSuite.Study.Endpoints;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>Computes every planned row of one endpoint. One worker owns an evaluator.</summary>
public abstract class EndpointEvaluator(AnalysisPlan plan)
{
    /// <summary>Values so far that had no transform and were taken as missing.</summary>
    public long UndefinedValues { get; private set; }

    /// <summary>Endpoints so far with at least one such value.</summary>
    public int EndpointsWithUndefinedValues { get; private set; }

    /// <summary>The plan.</summary>
    protected AnalysisPlan Plan => plan;

    /// <summary>Working memory of this worker.</summary>
    protected Scratch Scratch { get; } = new();

    /// <summary>Adds the rows of one endpoint: contrast by contrast, method by method, all sets before each stratum.</summary>
    /// <param name="values">The endpoint's values in the order of the arrangement's rows, NaN where missing; changed in place by the transform.</param>
    /// <param name="endpoint">What is known of the endpoint.</param>
    /// <param name="position">The endpoint's position within its block, written into the rows.</param>
    /// <param name="output">Where rows, details and differences go.</param>
    /// <exception cref="Storage.RefusalException">A value does not fit the endpoint's kind.</exception>
    public void Evaluate(Span<double> values, EndpointInfo endpoint, int position, BlockOutput output)
    {
        KindCheck.Run(values, endpoint, plan);
        output.Differences.Begin(plan.Flips?.Width ?? 0);
        int rowsBefore = output.Rows.Count;
        int detailsBefore = output.Details.Count;
        AddRows(values, endpoint, output, out int undefined);
        if (undefined > 0)
        {
            UndefinedValues += undefined;
            EndpointsWithUndefinedValues++;
        }

        foreach (ref ResultRow row in output.Rows.Records[rowsBefore..])
        {
            row.Endpoint = position;
            if (undefined > 0)
                row.Remarks |= Remarks.TransformUndefined;
        }

        foreach (ref DetailRow detail in output.Details.Records[detailsBefore..])
            detail.Endpoint = position;
    }

    /// <summary>Adds the endpoint's rows and details, and says how many of its values had no transform.</summary>
    protected abstract void AddRows(Span<double> values, EndpointInfo endpoint, BlockOutput output, out int undefined);

    /// <summary>Puts the study's stand-in for values below the endpoint's detection limit.</summary>
    /// <param name="values">The values; changed in place.</param>
    /// <param name="endpoint">What is known of the endpoint.</param>
    /// <param name="frame">Working memory that outlives the answer.</param>
    /// <returns>For each value 1 above the limit, 0 below, NaN where missing; empty where the endpoint has no limit.</returns>
    protected ReadOnlySpan<double> AboveLimit(Span<double> values, EndpointInfo endpoint, in Scratch.Frame frame)
    {
        if (endpoint.Kind != EndpointKind.Continuous || endpoint.DetectionLimit is not { } limit)
            return [];
        Span<double> above = frame.Doubles(values.Length);
        BelowLimitRule.Above(limit, values, above);
        BelowLimitRule.Apply(plan.Study.Endpoints.BelowLimit, limit, values);
        return above;
    }

    /// <summary>Transforms values in place and counts those that have no transform and become missing.</summary>
    protected int Transformed(Transform transform, Span<double> values)
    {
        if (transform != Transform.RankNormal)
            return ValueTransform.Apply(transform, values);
        RankNormalScores.Of(values, values, Scratch);
        return 0;
    }

    /// <summary>Why an endpoint with so few or so incomplete sets is not tested; null where it is.</summary>
    /// <param name="designed">Sets that the matching gives.</param>
    /// <param name="complete">Those of them with every value the comparison needs.</param>
    /// <param name="samples">Their samples.</param>
    protected TestResult? UntestedBefore(int designed, int complete, int samples) => UntestedBefore(plan, designed, complete, samples);

    /// <summary>The same for a plan.</summary>
    internal static TestResult? UntestedBefore(AnalysisPlan plan, int designed, int complete, int samples) =>
        UntestedBefore(plan, complete, samples, (designed - complete) / (double)designed);

    /// <summary>The same for a method that uses sets of which some samples lack a value.</summary>
    /// <param name="plan">The plan.</param>
    /// <param name="sets">Sets it uses.</param>
    /// <param name="samples">Samples it uses.</param>
    /// <param name="missing">Share of what the matching gives that lacks a value.</param>
    internal static TestResult? UntestedBefore(AnalysisPlan plan, int sets, int samples, double missing)
    {
        if (sets < plan.Study.Analysis.MinimumSets)
            return TestResult.Untested(Outcome.TooFewSets, sets, samples);
        return missing > (plan.Study.Gates.MissingAtMost ?? 1)
            ? TestResult.Untested(Outcome.TooManyMissing, sets, samples)
            : null;
    }
}
