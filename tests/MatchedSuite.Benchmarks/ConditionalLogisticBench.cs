using BenchmarkDotNet.Attributes;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Benchmarks;

/// <summary>
/// Conditional logistic regression on 500 sets of four, one endpoint an operation, from the block on: dropping missing members,
/// laying out, fitting, testing.
/// </summary>
[MemoryDiagnoser]
public class ConditionalLogisticBench
{
    private readonly Scratch _scratch = new();
    private readonly InventedSets _oneToThree = new(1);
    private readonly InventedSets _twoToTwo = new(2);

    /// <summary>1:3 without covariates.</summary>
    [Benchmark(OperationsPerInvoke = InventedSets.Endpoints)]
    public double OneToThree() => _oneToThree.Run(ConditionalLogistic.Run, _scratch);

    /// <summary>1:3 adjusted for one covariate.</summary>
    [Benchmark(OperationsPerInvoke = InventedSets.Endpoints)]
    public double OneToThreeAdjusted() => _oneToThree.RunAdjusted(ConditionalLogistic.Run, _scratch);

    /// <summary>2:2, by the recursion.</summary>
    [Benchmark(OperationsPerInvoke = InventedSets.Endpoints)]
    public double TwoToTwo() => _twoToTwo.Run(ConditionalLogistic.Run, _scratch);
}
