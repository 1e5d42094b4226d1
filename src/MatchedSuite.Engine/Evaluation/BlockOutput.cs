using MatchedSuite.Engine.Rows;

namespace MatchedSuite.Engine.Evaluation;

/// <summary>What the evaluation of a block's endpoints puts out; reused from block to block.</summary>
public sealed class BlockOutput
{
    /// <summary>The result rows.</summary>
    public RecordBuffer<ResultRow> Rows { get; } = new();

    /// <summary>The numbers beside them.</summary>
    public RecordBuffer<DetailRow> Details { get; } = new();

    /// <summary>What adjustments by sign flips need of each endpoint.</summary>
    public DifferenceBuffer Differences { get; } = new();

    /// <summary>Empties it for the next block.</summary>
    public void Clear()
    {
        Rows.Clear();
        Details.Clear();
        Differences.Clear();
    }
}
