namespace MatchedSuite.Engine.Running;

/// <summary>Work beside the main thread where a run has more than one; with one thread it is done at once.</summary>
/// <remarks>Disposing waits for the end, so that nothing is written into a folder that is given up.</remarks>
internal sealed class SideTask : IDisposable
{
    private readonly Task _task;

    /// <summary>Starts the work.</summary>
    public SideTask(int threads, Action work)
    {
        if (threads > 1)
        {
            _task = Task.Run(work);
            return;
        }

        work();
        _task = Task.CompletedTask;
    }

    /// <summary>Waits for the end; throws what the work threw.</summary>
    public void Finish() => _task.GetAwaiter().GetResult();

    /// <summary>Waits for the end, however it comes.</summary>
    public void Dispose() => ((IAsyncResult)_task).AsyncWaitHandle.WaitOne();
}
