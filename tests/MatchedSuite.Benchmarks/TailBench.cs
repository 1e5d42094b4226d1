using BenchmarkDotNet.Attributes;
using MatchedSuite.Statistics.Distributions;

namespace MatchedSuite.Benchmarks;

/// <summary>One tail and one quantile of Student's t, from the centre to far below the smallest double.</summary>
[MemoryDiagnoser]
public class TailBench
{
    /// <summary>The statistic.</summary>
    [Params(0.5, 2.0, 2.5, 5.0, 40.0, 1000.0)]
    public double T { get; set; }

    /// <summary>Degrees of freedom.</summary>
    [Params(4.0, 39.0, 5000.0)]
    public double Df { get; set; }

    [Benchmark]
    public double UpperTail() => StudentT.UpperTail(T, Df).Log10;

    [Benchmark]
    public double QuantileOfThatTail() => StudentT.UpperQuantile(StudentT.UpperTail(T, Df), Df);
}
