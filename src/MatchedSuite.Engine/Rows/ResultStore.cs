using MatchedSuite.Engine.Adjusting;

namespace MatchedSuite.Engine.Rows;

/// <summary>Everything a run's stream puts out, in scratch files of one folder.</summary>
public sealed class ResultStore(string folder) : IDisposable
{
    /// <summary>The result rows.</summary>
    public RowStore Rows { get; } = new(folder);

    /// <summary>The numbers beside them.</summary>
    public RecordStore<DetailRow> Details { get; } = new(Path.Combine(folder, "details.scratch"));

    /// <summary>The values that adjustments by sign flips need; null where none is asked for.</summary>
    public DifferenceStore? Differences { get; init; }

    /// <inheritdoc/>
    public void Dispose()
    {
        Rows.Dispose();
        Details.Dispose();
        Differences?.Dispose();
    }
}
