using BenchmarkDotNet.Attributes;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Pairs;

namespace MatchedSuite.Benchmarks;

/// <summary>Signed-rank with estimate and interval, one endpoint a call, from the two columns on.</summary>
[MemoryDiagnoser]
public class SignedRankBench
{
    private readonly Scratch _scratch = new();
    private PairedColumns _columns = null!;
    private int _endpoint;

    /// <summary>Number of pairs.</summary>
    [Params(40, 200, 1000)]
    public int Pairs { get; set; }

    /// <summary>Decimal places of the values: 12 gives no ties, 1 many.</summary>
    [Params(12, 1)]
    public int Decimals { get; set; }

    /// <summary>Makes the endpoints, and the tables that a run makes once.</summary>
    [GlobalSetup]
    public void Prepare()
    {
        _columns = new PairedColumns(Pairs, Decimals);
        for (int i = 0; i < PairedColumns.Endpoints; i++)
            WithEstimateAndInterval();
    }

    /// <summary>The whole method.</summary>
    [Benchmark]
    public double WithEstimateAndInterval()
    {
        _endpoint = (_endpoint + 1) % PairedColumns.Endpoints;
        using var frame = _scratch.Open();
        var pairs = PairSample.Of(_columns.Index(_endpoint), _columns.Reference(_endpoint), frame);
        return SignedRank.Run(pairs, TestOptions.Default, _scratch).P.Log10;
    }
}
