namespace MatchedSuite.Tests;

/// <summary>Bytes that a piece of work allocates on its thread.</summary>
internal static class Allocated
{
    private const int Tries = 8;

    /// <summary>
    /// The least of several tries after a first one that warms up: a collection that another test causes charges the unused rest of this
    /// thread's allocation window to it, which says nothing of the work.
    /// </summary>
    public static long Least(Action work)
    {
        work();
        long least = long.MaxValue;
        for (int attempt = 0; attempt < Tries; attempt++)
        {
            long before = GC.GetAllocatedBytesForCurrentThread();
            work();
            least = Math.Min(least, GC.GetAllocatedBytesForCurrentThread() - before);
        }

        return least;
    }
}
