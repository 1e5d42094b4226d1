using MatchedSuite.Storage.Values;

namespace MatchedSuite.Engine.Running;

/// <summary>What one thread does with the blocks it takes.</summary>
internal interface IBlockWorker
{
    /// <summary>Computes the rows of a loaded block.</summary>
    void Work(EndpointBlock block, BlockResult result);
}
