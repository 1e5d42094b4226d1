using BenchmarkDotNet.Attributes;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Benchmarks;

/// <summary>Paired t-test, one endpoint a call, from the two columns on.</summary>
[MemoryDiagnoser]
public class PairedTBench
{
    private readonly Scratch _scratch = new();
    private PairedColumns _columns = null!;
    private int _endpoint;

    /// <summary>Number of pairs.</summary>
    [Params(40, 200, 1000)]
    public int Pairs { get; set; }

    /// <summary>Makes the endpoints, and the quantile that a run finds once.</summary>
    [GlobalSetup]
    public void Prepare()
    {
        _columns = new PairedColumns(Pairs, decimals: 12);
        WithInterval();
    }

    /// <summary>Taking the differences alone.</summary>
    [Benchmark]
    public double Differences()
    {
        _endpoint = (_endpoint + 1) % PairedColumns.Endpoints;
        using var frame = _scratch.Open();
        return PairSample.Of(_columns.Index(_endpoint), _columns.Reference(_endpoint), frame).Differences[0];
    }

    /// <summary>Differences and the whole method.</summary>
    [Benchmark]
    public double WithInterval()
    {
        _endpoint = (_endpoint + 1) % PairedColumns.Endpoints;
        using var frame = _scratch.Open();
        var pairs = PairSample.Of(_columns.Index(_endpoint), _columns.Reference(_endpoint), frame);
        return PairedT.Run(pairs, TestOptions.Default, _scratch).P.Log10;
    }
}
