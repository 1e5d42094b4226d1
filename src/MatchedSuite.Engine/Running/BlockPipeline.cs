using System.Runtime.ExceptionServices;
using MatchedSuite.Storage.Values;

namespace MatchedSuite.Engine.Running;

/// <summary>Runs blocks of endpoints over several threads and hands their rows on in the order of the data.</summary>
/// <remarks>
/// Blocks are taken in order under a lock, worked on by whoever took them, and committed in order, so that neither the
/// rows nor the first error depend on the number of threads. A thread far ahead of the slowest waits, which bounds memory.
/// </remarks>
internal sealed class BlockPipeline : IDisposable
{
    private const int BlocksAheadPerThread = 4;
    private readonly IEnumerator<PendingBlock> _blocks;
    private readonly Func<IBlockWorker> _hire;
    private readonly Action<BlockResult> _commit;
    private readonly int _threads;
    private readonly object _taking = new();
    private readonly object _committing = new();
    private readonly Dictionary<int, BlockResult> _early = [];
    private readonly Stack<BlockResult> _spare = new();
    private int _taken;
    private int _next;
    private (int Number, Exception Error)? _failure;

    /// <summary>A pipeline over <paramref name="blocks"/>; <paramref name="commit"/> sees one finished block at a time, in order.</summary>
    public BlockPipeline(IEnumerable<PendingBlock> blocks, Func<IBlockWorker> hire, Action<BlockResult> commit, int threads)
    {
        _blocks = blocks.GetEnumerator();
        _hire = hire;
        _commit = commit;
        _threads = threads;
    }

    /// <summary>Works until the last block is committed; throws the error of the earliest failing block.</summary>
    public void Run(CancellationToken cancellation)
    {
        var threads = new Thread[_threads - 1];
        for (int i = 0; i < threads.Length; i++)
        {
            threads[i] = new Thread(() => Work(cancellation)) { IsBackground = true };
            threads[i].Start();
        }

        Work(cancellation);
        foreach (Thread thread in threads)
            thread.Join();
        cancellation.ThrowIfCancellationRequested();
        if (_failure is { } failure)
            ExceptionDispatchInfo.Throw(failure.Error);
    }

    /// <inheritdoc/>
    public void Dispose() => _blocks.Dispose();

    private void Work(CancellationToken cancellation)
    {
        int number = -1;
        try
        {
            IBlockWorker worker = _hire();
            var block = new EndpointBlock();
            while (Take(cancellation, out number) is { } pending)
            {
                BlockResult result = Spare();
                pending.Load(block);
                worker.Work(block, result);
                result.Number = number;
                result.Reached = pending.Reached;
                Commit(result);
            }
        }
        catch (Exception error)
        {
            Fail(number, error);
        }
    }

    private PendingBlock? Take(CancellationToken cancellation, out int number)
    {
        lock (_taking)
        {
            // The thread that asks for the next block fails at its number, even where reading ahead is what fails.
            number = _taken;
            WaitForTheSlowest(number);
            if (cancellation.IsCancellationRequested || HasFailed() || !_blocks.MoveNext())
                return null;
            _taken = number + 1;
            return _blocks.Current;
        }
    }

    private void WaitForTheSlowest(int number)
    {
        lock (_committing)
        {
            while (_failure is null && number - _next > BlocksAheadPerThread * _threads)
                Monitor.Wait(_committing);
        }
    }

    private bool HasFailed()
    {
        lock (_committing)
            return _failure is not null;
    }

    private BlockResult Spare()
    {
        lock (_committing)
            return _spare.Count > 0 ? _spare.Pop() : new BlockResult();
    }

    private void Commit(BlockResult result)
    {
        lock (_committing)
        {
            _early.Add(result.Number, result);
            while (_failure is null && _early.Remove(_next, out BlockResult? ready))
            {
                _commit(ready);
                ready.Clear();
                _spare.Push(ready);
                _next++;
            }

            Monitor.PulseAll(_committing);
        }
    }

    private void Fail(int number, Exception error)
    {
        lock (_committing)
        {
            if (_failure is null || number < _failure.Value.Number)
                _failure = (number, error);
            Monitor.PulseAll(_committing);
        }
    }
}
