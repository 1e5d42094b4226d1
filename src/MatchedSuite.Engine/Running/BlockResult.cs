using MatchedSuite.Engine.Evaluation;

namespace MatchedSuite.Engine.Running;

/// <summary>What came out of one block; reused.</summary>
internal sealed class BlockResult
{
    /// <summary>Position of the block in the data.</summary>
    public int Number { get; set; }

    /// <summary>Share of the input that lies before the end of this block.</summary>
    public double Reached { get; set; }

    /// <summary>Names of the block's endpoints.</summary>
    public List<string> Names { get; } = [];

    /// <summary>Rows and details; an endpoint is named by its position in <see cref="Names"/>.</summary>
    public BlockOutput Output { get; } = new();

    /// <summary>Values that had no transform.</summary>
    public long UndefinedValues { get; set; }

    /// <summary>Endpoints with such values.</summary>
    public int EndpointsWithUndefinedValues { get; set; }

    /// <summary>How long the evaluation of its endpoints took, reading not counted.</summary>
    public TimeSpan Evaluation { get; set; }

    /// <summary>Empties it for the next block.</summary>
    public void Clear()
    {
        Names.Clear();
        Output.Clear();
        UndefinedValues = 0;
        EndpointsWithUndefinedValues = 0;
    }
}
