namespace MatchedSuite.Engine.Rows;

/// <summary>Everything a run's stream puts out, in scratch files of one folder.</summary>
public sealed class ResultStore(string folder) : IDisposable
{
    /// <summary>The result rows.</summary>
    public RowStore Rows { get; } = new(folder);

    /// <summary>The numbers beside them.</summary>
    public RecordStore<DetailRow> Details { get; } = new(Path.Combine(folder, "details.scratch"));

    /// <inheritdoc/>
    public void Dispose()
    {
        Rows.Dispose();
        Details.Dispose();
    }
}
