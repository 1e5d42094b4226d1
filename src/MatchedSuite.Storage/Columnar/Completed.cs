namespace MatchedSuite.Storage.Columnar;

/// <summary>Results of asynchronous calls that are done, or nearly so: see <see cref="SynchronousStream"/>.</summary>
internal static class Completed
{
    public static void Wait(ValueTask task) => task.AsTask().GetAwaiter().GetResult();

    public static void Wait(Task task) => task.GetAwaiter().GetResult();

    public static T Of<T>(Task<T> task) => task.GetAwaiter().GetResult();
}
