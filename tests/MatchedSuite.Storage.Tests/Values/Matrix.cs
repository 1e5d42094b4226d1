using MatchedSuite.Storage.Values;

namespace MatchedSuite.Storage.Tests.Values;

/// <summary>An invented matrix of endpoints by samples, with missing values, and what a source makes of it.</summary>
internal sealed class Matrix
{
    private readonly double[,] _values;

    public Matrix(int endpoints, int samples, int seed = 20261201)
    {
        var random = new Random(seed);
        _values = new double[endpoints, samples];
        for (int endpoint = 0; endpoint < endpoints; endpoint++)
            for (int sample = 0; sample < samples; sample++)
                _values[endpoint, sample] = random.Next(20) == 0 ? double.NaN : Math.Round(random.NextDouble() * 200 - 50, 3);
        Endpoints = [.. Enumerable.Range(0, endpoints).Select(i => $"marker {i}")];
        Samples = [.. Enumerable.Range(0, samples).Select(i => $"s{i:000}")];
    }

    public string[] Endpoints { get; }

    public string[] Samples { get; }

    public double this[int endpoint, int sample] => _values[endpoint, sample];

    /// <summary>Loads all blocks, by one or more threads, and puts them together in their order.</summary>
    public static List<(string Name, double[] Values)> Load(EndpointSource source, EndpointSelection selection, int threads = 1)
    {
        var blocks = new SortedDictionary<int, List<(string, double[])>>();
        double reached = 0;
        try
        {
            Parallel.ForEach(
                System.Collections.Concurrent.Partitioner.Create(source.Blocks(selection), System.Collections.Concurrent.EnumerablePartitionerOptions.NoBuffering),
                new ParallelOptions { MaxDegreeOfParallelism = threads },
                () => new EndpointBlock(),
                (pending, _, block) =>
                {
                    pending.Load(block);
                    Assert.InRange(block.Count, 0, selection.EndpointsPerBlock);
                    Assert.Equal(selection.Samples.Length, block.Samples);
                    var copy = Enumerable.Range(0, block.Count).Select(i => (block.Names[i], block.Values(i).ToArray())).ToList();
                    lock (blocks)
                    {
                        blocks.Add(pending.Number, copy);
                        reached = Math.Max(reached, pending.Reached);
                    }
                    return block;
                },
                _ => { });
        }
        catch (AggregateException several)
        {
            System.Runtime.ExceptionServices.ExceptionDispatchInfo.Throw(several.InnerExceptions[0]);
        }
        Assert.Equal(Enumerable.Range(0, blocks.Count), blocks.Keys);
        Assert.InRange(reached, 0, 1 + 1e-9);
        return [.. blocks.Values.SelectMany(block => block)];
    }

    public static EndpointSelection All(EndpointSource source, int perBlock) =>
        new([.. Enumerable.Range(0, source.Samples.Count)], _ => true, perBlock);

    /// <summary>Asserts that what was loaded is this matrix, for the samples in the order asked for.</summary>
    public void AssertEqual(List<(string Name, double[] Values)> loaded, int[] samples, Func<string, bool> wanted)
    {
        int[] endpoints = [.. Enumerable.Range(0, Endpoints.Length).Where(endpoint => wanted(Endpoints[endpoint]))];
        Assert.Equal(endpoints.Select(endpoint => Endpoints[endpoint]), loaded.Select(row => row.Name));
        for (int i = 0; i < endpoints.Length; i++)
            for (int place = 0; place < samples.Length; place++)
                Assert.Equal(BitConverter.DoubleToInt64Bits(_values[endpoints[i], samples[place]] + 0.0),
                    BitConverter.DoubleToInt64Bits(loaded[i].Values[place] + 0.0));
    }
}
