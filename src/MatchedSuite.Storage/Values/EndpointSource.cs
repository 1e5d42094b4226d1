namespace MatchedSuite.Storage.Values;

/// <summary>A file of measurements that can be streamed in blocks of endpoints, whatever its format and layout.</summary>
public abstract class EndpointSource : IDisposable
{
    /// <summary>The sample names, in file order. Known from the header alone where samples are columns; else read from the key column.</summary>
    public abstract IReadOnlyList<string> Samples { get; }

    /// <summary>The wanted blocks in file order. May be enumerated more than once; one enumeration at a time.</summary>
    public abstract IEnumerable<PendingBlock> Blocks(EndpointSelection selection);

    /// <inheritdoc/>
    public abstract void Dispose();
}
