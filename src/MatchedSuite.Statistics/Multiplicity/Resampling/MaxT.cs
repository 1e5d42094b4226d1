namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>The max-T adjustment of Westfall and Young by common sign flips of whole sets: familywise error rate, using how endpoints move together.</summary>
/// <remarks>
/// <para>Null: the differences of a set, over all its endpoints together, are symmetric about zero. A flip changes the sign of all of
/// a set's differences at once, so it leaves the dependence between endpoints as it is.</para>
/// <para>Single step: b = flips in which the largest statistic of any endpoint reaches the observed one. Step-down: in which the
/// largest among this endpoint and all less significant ones does, made monotone from the most significant on. p = (1 + b)/(1 + B);
/// where all flips can be listed this is the exact p-value, and the step-down controls the familywise error rate strongly.</para>
/// <para>Endpoints may lack different sets: each is compared through its own t. Statistics that differ by less than 1e-9 of
/// themselves are ties and count. Counts are those of double precision throughout, whatever the threads, panels and vector width.</para>
/// <para>Sources: Westfall and Young (1993), Resampling-Based Multiple Testing; Ge, Dudoit and Speed (2003), TEST 12, 1-77;
/// Phipson and Smyth (2010), Stat Appl Genet Mol Biol 9:39. Worked through in docs/methods/max-t.md.</para>
/// </remarks>
public static class MaxT
{
    // Flips that one thread takes through the endpoints: for two hundred sets their patterns and maxima fill half a megabyte.
    private const int LargestBlock = 2560;

    /// <summary>Adjusts all endpoints of a store.</summary>
    /// <param name="store">The differences.</param>
    /// <param name="options">The flips and the statistic.</param>
    /// <param name="cancellation">Stops the run between panels and blocks.</param>
    /// <exception cref="ArgumentOutOfRangeException">An option is out of range.</exception>
    public static ResamplingResult Run(IDifferenceStore store, ResamplingOptions options, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(store);
        ArgumentNullException.ThrowIfNull(options);
        options.Validate();
        return Run(store, new CommonFlips(store.Sets, options.Seed, options.Resamples), options, cancellation);
    }

    /// <summary>The same through any sign patterns that leave the null hypothesis as it is.</summary>
    internal static ResamplingResult Run(IDifferenceStore store, ISignPatterns flips, ResamplingOptions options, CancellationToken cancellation)
    {
        var endpoints = new ScaledEndpoints(store, flips, options, cancellation);
        var thresholds = new Thresholds(endpoints);
        var maxima = new double[flips.Count];
        Array.Fill(maxima, double.NegativeInfinity);
        var stepDown = new int[thresholds.Exact.Length];
        if (endpoints.Count == 0)
            return Result(endpoints, flips, thresholds, stepDown, [], double.PositiveInfinity);

        var panel = new QuantizedPanel(endpoints);
        var exact = new ExactFlips(endpoints, thresholds, flips);
        foreach (var (flip, position) in FollowAll(panel, endpoints, thresholds, flips, maxima, stepDown, cancellation))
            exact.AskPosition(flip, position);
        var ordered = new OrderedMaxima(maxima, thresholds, options.Level);
        ordered.AskOpenOnes(exact);
        ordered.Settle(exact.Settle(panel, stepDown, cancellation));
        double critical = EndpointScale.StatisticOf(ordered.Critical, store.Sets, options.Statistic);
        return Result(endpoints, flips, thresholds, stepDown, ordered.CountsReaching(), critical);
    }

    private static List<(int Flip, int Position)> FollowAll(QuantizedPanel panel, ScaledEndpoints endpoints, Thresholds thresholds,
        ISignPatterns flips, double[] maxima, int[] counts, CancellationToken cancellation)
    {
        var undecided = new List<(int, int)>();
        int threads = endpoints.Options.Threads;
        int rounds = (int)((flips.Count + (long)threads * LargestBlock - 1) / ((long)threads * LargestBlock));
        int block = (flips.Count + (threads * rounds) - 1) / (threads * rounds);
        int blocks = (flips.Count + block - 1) / block;
        var parallel = new ParallelOptions { MaxDegreeOfParallelism = threads, CancellationToken = cancellation };
        for (int tile = 0; tile < QuantizedPanel.TilesOf(endpoints); tile += panel.Tiles)
        {
            panel.Load(tile, cancellation);
            Parallel.For(0, blocks, parallel, () => new StepDownBlock(endpoints.Sets, block, flips, thresholds), (at, _, worker) =>
            {
                int first = at * block;
                worker.Run(panel, first, maxima.AsSpan(first, Math.Min(block, flips.Count - first)), counts);
                return worker;
            },
            worker =>
            {
                lock (undecided)
                    undecided.AddRange(worker.Undecided);
            });
        }

        return undecided;
    }

    private static ResamplingResult Result(ScaledEndpoints endpoints, ISignPatterns flips, Thresholds thresholds,
        int[] stepDown, int[] singleStep, double critical)
    {
        var result = new AdjustedCounts(endpoints.All, flips.Count);
        for (int place = endpoints.Count - 1; place >= 0; place--)
        {
            int position = place + thresholds.Padding;
            result.Add(endpoints.EndpointAt(place), stepDown[position], singleStep[position]);
        }

        return result.ToResult(flips, critical);
    }
}
