using BenchmarkDotNet.Attributes;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Benchmarks;

/// <summary>
/// Conditional logistic regression on 500 sets of 1:3, one endpoint an operation, taken from the block on: dropping
/// missing members, laying out, fitting, testing. The mean over 64 endpoints, a tenth of them with an effect.
/// </summary>
[MemoryDiagnoser]
public class ConditionalLogisticBench
{
    private const int Endpoints = 64;
    private const int Sets = 500;
    private const int Members = 4;
    private readonly Scratch _scratch = new();
    private readonly double[][] _values = new double[Endpoints][];
    private readonly int[] _starts = [.. Enumerable.Range(0, Sets + 1).Select(s => s * Members)];
    private readonly bool[] _isIndex = [.. Enumerable.Range(0, Sets * Members).Select(i => i % Members == 0)];
    private readonly double[] _covariate = new double[Sets * Members];

    /// <summary>Invents the endpoints.</summary>
    [GlobalSetup]
    public void Invent()
    {
        var random = new Random(20261201);
        for (int e = 0; e < Endpoints; e++)
        {
            _values[e] = new double[Sets * Members];
            for (int s = 0; s < Sets; s++)
            {
                double level = Normal(random);
                for (int i = 0; i < Members; i++)
                    _values[e][(s * Members) + i] = level + Normal(random) + (i == 0 && e % 10 == 0 ? 0.25 : 0);
            }
        }

        for (int i = 0; i < _covariate.Length; i++)
            _covariate[i] = Normal(random);
    }

    /// <summary>Without covariates.</summary>
    [Benchmark(OperationsPerInvoke = Endpoints)]
    public double OneToThree() => Run([]);

    /// <summary>Adjusted for one covariate.</summary>
    [Benchmark(OperationsPerInvoke = Endpoints)]
    public double OneToThreeAdjusted() => Run(_covariate);

    private double Run(ReadOnlySpan<double> covariates)
    {
        double sum = 0;
        foreach (double[] values in _values)
        {
            using Scratch.Frame frame = _scratch.Open();
            SetSample sets = SetSample.Of(values, _starts, _isIndex, covariates, frame);
            sum += ConditionalLogistic.Run(sets, TestOptions.Default, _scratch).Statistic;
        }

        return sum;
    }

    private static double Normal(Random random) =>
        Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
}
