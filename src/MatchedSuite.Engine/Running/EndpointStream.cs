using MatchedSuite.Engine.Planning;
using MatchedSuite.Engine.Rows;
using MatchedSuite.Storage;
using MatchedSuite.Storage.Values;

namespace MatchedSuite.Engine.Running;

/// <summary>Streams every endpoint through the plan's methods into a store.</summary>
internal sealed class EndpointStream
{
    private const int MostEndpointsPerBlock = 1024;
    private readonly AnalysisPlan _plan;
    private readonly ResultStore _store;
    private readonly IRunObserver _observer;
    private readonly HashSet<string> _known = new(StringComparer.Ordinal);

    private EndpointStream(AnalysisPlan plan, ResultStore store, IRunObserver observer)
    {
        _plan = plan;
        _store = store;
        _observer = observer;
    }

    /// <summary>Names of the endpoints, in the order of the data; a row's endpoint is a position here.</summary>
    public List<string> Names { get; } = [];

    /// <summary>Values that had no transform and were taken as missing.</summary>
    public long UndefinedValues { get; private set; }

    /// <summary>Endpoints with such values.</summary>
    public int EndpointsWithUndefinedValues { get; private set; }

    /// <summary>Time that the threads together spent on evaluation, reading not counted.</summary>
    public TimeSpan Evaluation { get; private set; }

    /// <summary>Runs the stream to its end.</summary>
    public static EndpointStream Run(
        AnalysisPlan plan, EndpointSource source, ResultStore store, RunOptions options, IRunObserver observer, CancellationToken cancellation)
    {
        var stream = new EndpointStream(plan, store, observer);
        var selection = new EndpointSelection(plan.SourceColumns, plan.Catalogue.Wanted, BlockSize(plan, options));
        using var pipeline = new BlockPipeline(
            source.Blocks(selection), () => new EvaluationWorker(plan), stream.Commit, options.Threads);
        pipeline.Run(cancellation);
        observer.ProgressOver();
        return stream;
    }

    // A quarter of the memory for blocks under way, shared by the threads; never so large that threads starve.
    internal static int BlockSize(AnalysisPlan plan, RunOptions options)
    {
        if (options.EndpointsPerBlock is { } asked)
            return asked;
        long bytesPerEndpoint = sizeof(double) * (long)plan.Arrangement.Rows.Length;
        long fitting = options.Memory / 4 / options.Threads / bytesPerEndpoint;
        return (int)Math.Clamp(fitting, 1, MostEndpointsPerBlock);
    }

    private void Commit(BlockResult block)
    {
        foreach (string name in block.Names)
        {
            if (!_known.Add(name))
            {
                throw new RefusalException(
                    _plan.ValuesFile, $"endpoint '{name}' occurs more than once", "every endpoint once",
                    "Give the measurements different names, or remove the copy.");
            }
        }

        foreach (ref ResultRow row in block.Output.Rows.Records)
            row.Endpoint += Names.Count;
        foreach (ref DetailRow detail in block.Output.Details.Records)
            detail.Endpoint += Names.Count;
        Names.AddRange(block.Names);
        _store.Rows.Append(block.Output.Rows.Records);
        _store.Details.Append(block.Output.Details.Records);
        _store.Differences?.Append(block.Output.Differences.Values);
        Evaluation += block.Evaluation;
        UndefinedValues += block.UndefinedValues;
        EndpointsWithUndefinedValues += block.EndpointsWithUndefinedValues;
        _observer.Progress(block.Reached, Names.Count);
    }
}
