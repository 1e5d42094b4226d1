using BenchmarkDotNet.Attributes;
using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Visits;

namespace MatchedSuite.Benchmarks;

/// <summary>One endpoint of 200 subjects × 4 visits, 3 % missing: fit, three differences and the omnibus test.</summary>
[MemoryDiagnoser]
public class MixedModelBench
{
    private const int Subjects = 200, Visits = 4, Endpoints = 50;
    private readonly Scratch _scratch = new();
    private readonly double[][] _endpoints = new double[Endpoints][];
    private readonly double[] _times = [0, 1, 2, 3];
    private int _next;

    /// <summary>Fills the endpoints with seeded noise around a subject level.</summary>
    [GlobalSetup]
    public void Fill()
    {
        var random = new Random(7);
        for (int e = 0; e < Endpoints; e++)
        {
            double[] values = _endpoints[e] = new double[Subjects * Visits];
            double level = 0;
            for (int at = 0; at < values.Length; at++)
            {
                if (at % Visits == 0)
                    level = Normal(random);
                values[at] = random.NextDouble() < 0.03 ? double.NaN : level + Normal(random) + 0.1 * (at % Visits);
            }
        }
    }

    [Benchmark]
    public double Fit()
    {
        using var frame = _scratch.Open();
        return MixedModel.Fit(Next(), VisitTerm.Means, frame).VarianceRatio;
    }

    [Benchmark(Baseline = true)]
    public double FitWithThreeDifferencesAndOmnibus()
    {
        using var frame = _scratch.Open();
        var fit = MixedModel.Fit(Next(), VisitTerm.Means, frame);
        double sum = MixedModel.Omnibus(fit, TestOptions.Default, _scratch).P.Log10;
        for (int visit = 1; visit < Visits; visit++)
            sum += MixedModel.Difference(fit, visit, 0, TestOptions.Default, _scratch).P.Log10;
        return sum;
    }

    [Benchmark]
    public double RepeatedMeasures() =>
        RepeatedMeasuresAnova.GreenhouseGeisser(Next(), TestOptions.Default, _scratch).P.Log10;

    private VisitSample Next()
    {
        _next = (_next + 1) % Endpoints;
        return VisitSample.Of(_endpoints[_next], _times);
    }

    private static double Normal(Random random) =>
        Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
}
