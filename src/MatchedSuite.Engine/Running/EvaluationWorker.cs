using System.Diagnostics;
using MatchedSuite.Engine.Evaluation;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Storage.Values;

namespace MatchedSuite.Engine.Running;

/// <summary>One thread's evaluation of the blocks it takes.</summary>
internal sealed class EvaluationWorker(AnalysisPlan plan) : IBlockWorker
{
    private readonly EndpointEvaluator _evaluator = plan.NewEvaluator();

    /// <inheritdoc/>
    public void Work(EndpointBlock block, BlockResult result)
    {
        long start = Stopwatch.GetTimestamp();
        long undefinedBefore = _evaluator.UndefinedValues;
        int endpointsBefore = _evaluator.EndpointsWithUndefinedValues;
        for (int endpoint = 0; endpoint < block.Count; endpoint++)
        {
            result.Names.Add(block.Names[endpoint]);
            _evaluator.Evaluate(block.Values(endpoint), plan.Catalogue.Describe(block.Names[endpoint]), endpoint, result.Output);
        }

        result.Evaluation = Stopwatch.GetElapsedTime(start);
        result.UndefinedValues = _evaluator.UndefinedValues - undefinedBefore;
        result.EndpointsWithUndefinedValues = _evaluator.EndpointsWithUndefinedValues - endpointsBefore;
    }
}
