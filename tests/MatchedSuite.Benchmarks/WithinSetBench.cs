using BenchmarkDotNet.Attributes;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Benchmarks;

/// <summary>The other methods on 500 sets of 1:3, one endpoint an operation.</summary>
[MemoryDiagnoser]
public class WithinSetBench
{
    private readonly Scratch _scratch = new();
    private readonly InventedSets _sets = new(1);

    /// <summary>Linear model with a fixed effect a set.</summary>
    [Benchmark(OperationsPerInvoke = InventedSets.Endpoints)]
    public double Linear() => _sets.Run(WithinSetLinear.Run, _scratch);

    /// <summary>Aligned ranks with estimate and interval.</summary>
    [Benchmark(OperationsPerInvoke = InventedSets.Endpoints)]
    public double Rank() => _sets.Run(AlignedRank.Run, _scratch);

    /// <summary>9,999 random relabelings with interval.</summary>
    [Benchmark(OperationsPerInvoke = InventedSets.Endpoints)]
    public double Relabel() => _sets.Run(SetRelabel.Run, _scratch);
}
