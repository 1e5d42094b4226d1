using MatchedSuite.Engine.Adjusting;
using MatchedSuite.Engine.Planning;
using MatchedSuite.Storage.Values;

namespace MatchedSuite.Engine.Running;

/// <summary>Reads the measurements a second time for the intervals whose confidence depends on all p-values.</summary>
/// <remarks>
/// Every method finds its own interval anew, so exact and rank methods give exact and rank intervals; nothing is
/// stretched from the marginal one.
/// </remarks>
internal static class IntervalPass
{
    /// <summary>Finds the intervals and leaves them in <paramref name="columns"/>.</summary>
    public static void Run(
        AnalysisPlan plan, EndpointSource source, IReadOnlyList<string> names, IntervalPlan wanted, AdjustedColumns columns, RunOptions options,
        IRunObserver observer, CancellationToken cancellation)
    {
        var positions = new Dictionary<string, int>(names.Count, StringComparer.Ordinal);
        for (int endpoint = 0; endpoint < names.Count; endpoint++)
            positions.Add(names[endpoint], endpoint);
        int finished = 0;
        var selection = new EndpointSelection(plan.SourceColumns, plan.Catalogue.Wanted, EndpointStream.BlockSize(plan, options));
        using var pipeline = new BlockPipeline(
            source.Blocks(selection), () => new IntervalWorker(plan, wanted, positions, columns),
            block => observer.Progress(block.Reached, finished += block.Names.Count), options.Threads);
        pipeline.Run(cancellation);
        observer.ProgressOver();
    }
}
