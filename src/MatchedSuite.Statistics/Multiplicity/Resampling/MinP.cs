namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>The min-P adjustment of Westfall and Young by common sign flips of whole sets: familywise error rate, every endpoint on its own p-scale.</summary>
/// <remarks>
/// <para>Like <see cref="MaxT"/>, but endpoints are compared by the marginal p-value of each flip, which is the share of all flips,
/// the data included, whose statistic is at least as extreme. Endpoints of different shapes then weigh the same; the price is that
/// marginal p-values cannot be smaller than 1/(1 + B), so many endpoints need many flips.</para>
/// <para>b = flips in which the smallest p of this endpoint and all less significant ones (single step: of all) is at most
/// the observed. p = (1 + b)/(1 + B). Statistics that differ by less than 1e-9 of themselves are ties.</para>
/// <para>Sources: Westfall and Young (1993), Resampling-Based Multiple Testing; Ge, Dudoit and Speed (2003), TEST 12, 1-77, for
/// the algorithm that holds one endpoint's flips at a time. Worked through in docs/methods/min-p.md.</para>
/// </remarks>
public static class MinP
{
    private const int LargestPanel = 256;
    private const int FlipsOfOneTask = 4096;

    /// <summary>Adjusts all endpoints of a store.</summary>
    /// <param name="store">The differences.</param>
    /// <param name="options">The flips and the statistic. t and score order one endpoint's flips alike, so they give the same p.</param>
    /// <param name="cancellation">Stops the run between endpoints.</param>
    /// <returns>The adjusted p-values; there is no common critical value, so it is NaN.</returns>
    /// <exception cref="ArgumentOutOfRangeException">An option is out of range.</exception>
    public static ResamplingResult Run(IDifferenceStore store, ResamplingOptions options, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(store);
        ArgumentNullException.ThrowIfNull(options);
        options.Validate();
        var flips = new CommonFlips(store.Sets, options.Seed, options.Resamples);
        var endpoints = new ScaledEndpoints(store, flips, options, cancellation);
        byte[] patterns = FlipCounts.PatternsOf(flips, store.Sets);
        var parallel = new ParallelOptions { MaxDegreeOfParallelism = options.Threads, CancellationToken = cancellation };
        var observed = new int[endpoints.Count];
        Parallel.For(0, observed.Length, parallel, () => new FlipCounts(endpoints, patterns), (place, _, worker) =>
        {
            observed[place] = worker.Observed(place);
            return worker;
        }, _ => { });

        int[] order = [.. Enumerable.Range(0, observed.Length).OrderByDescending(place => observed[place])];
        int[] sorted = Array.ConvertAll(order, place => observed[place]);
        var smallest = new int[flips.Count];
        Array.Fill(smallest, int.MaxValue);
        int[] stepDown = StepDown(endpoints, patterns, order, sorted, smallest, parallel);
        int[] singleStep = CountsReaching(smallest, sorted);
        var result = new AdjustedCounts(endpoints.All, flips.Count);
        for (int at = order.Length - 1; at >= 0; at--)
            result.Add(endpoints.EndpointAt(order[at]), stepDown[at], singleStep[at]);
        return result.ToResult(flips, double.NaN);
    }

    // From the least significant endpoint on; leaves the smallest count of each flip over all endpoints behind.
    private static int[] StepDown(ScaledEndpoints endpoints, byte[] patterns, int[] order, int[] observed, int[] smallest, ParallelOptions parallel)
    {
        int flips = smallest.Length;
        int panel = (int)Math.Clamp(endpoints.Options.PanelMemory / (sizeof(int) * (long)flips), 1, Math.Min(LargestPanel, Array.MaxLength / flips));
        var counts = new int[Math.Min(panel, order.Length) * flips];
        var reached = new int[order.Length];
        for (int first = 0; first < order.Length; first += panel)
        {
            int here = Math.Min(panel, order.Length - first);
            Parallel.For(0, here, parallel, () => new FlipCounts(endpoints, patterns), (at, _, worker) =>
            {
                worker.OfEveryFlip(order[first + at], counts.AsSpan(at * flips, flips));
                return worker;
            }, _ => { });
            Parallel.For(0, (flips + FlipsOfOneTask - 1) / FlipsOfOneTask, parallel, task =>
            {
                int start = task * FlipsOfOneTask;
                var running = smallest.AsSpan(start, Math.Min(FlipsOfOneTask, flips - start));
                for (int at = 0; at < here; at++)
                    Interlocked.Add(ref reached[first + at], Lower(running, counts.AsSpan(at * flips + start, running.Length), observed[first + at]));
            });
        }

        return reached;
    }

    private static int Lower(Span<int> running, ReadOnlySpan<int> counts, int observed)
    {
        int reached = 0;
        for (int flip = 0; flip < running.Length; flip++)
        {
            running[flip] = Math.Min(running[flip], counts[flip]);
            if (running[flip] <= observed)
                reached++;
        }

        return reached;
    }

    private static int[] CountsReaching(int[] smallest, int[] observed)
    {
        int[] ascending = [.. smallest.Order()];
        return Array.ConvertAll(observed, count =>
        {
            int low = 0;
            int high = ascending.Length;
            while (low < high)
            {
                int middle = low + ((high - low) >> 1);
                if (ascending[middle] <= count)
                    low = middle + 1;
                else
                    high = middle;
            }

            return low;
        });
    }
}
