namespace MatchedSuite.Storage.Values;

/// <summary>A block that is ready to be loaded: handed out in file order by one thread, loaded by any thread.</summary>
public abstract class PendingBlock
{
    /// <summary>Position of the block in the file, from 0; results are put together in this order.</summary>
    public required int Number { get; init; }

    /// <summary>Share of the input that lies before the end of this block, in [0, 1], for a progress bar.</summary>
    public required double Reached { get; init; }

    /// <summary>Reads the block's values, once. Safe to call on another thread than the one that enumerates.</summary>
    /// <remarks>The block may be loaded after the enumeration has moved on or ended, but not after the next one has begun or the source is disposed.</remarks>
    /// <exception cref="RefusalException">A cell is not a number, a row is ragged, the file is damaged.</exception>
    public abstract void Load(EndpointBlock target);
}
