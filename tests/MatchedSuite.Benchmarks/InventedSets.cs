using MatchedSuite.Statistics;
using MatchedSuite.Statistics.Sets;

namespace MatchedSuite.Benchmarks;

/// <summary>64 invented endpoints on 500 matched sets of four, a tenth of them with an effect, and a covariate.</summary>
internal sealed class InventedSets
{
    /// <summary>Number of endpoints.</summary>
    public const int Endpoints = 64;
    private const int Sets = 500;
    private const int Members = 4;
    private readonly double[][] _values = new double[Endpoints][];
    private readonly int[] _starts = [.. Enumerable.Range(0, Sets + 1).Select(s => s * Members)];
    private readonly bool[] _isIndex;
    private readonly double[] _covariate = new double[Sets * Members];

    /// <summary>Invents them with so many index members a set.</summary>
    public InventedSets(int indexMembers)
    {
        var random = new Random(20261201);
        _isIndex = [.. Enumerable.Range(0, Sets * Members).Select(i => i % Members < indexMembers)];
        for (int e = 0; e < Endpoints; e++)
        {
            _values[e] = new double[Sets * Members];
            for (int s = 0; s < Sets; s++)
            {
                double level = Normal(random);
                for (int i = 0; i < Members; i++)
                    _values[e][(s * Members) + i] = level + Normal(random) + (i < indexMembers && e % 10 == 0 ? 0.25 : 0);
            }
        }

        for (int i = 0; i < _covariate.Length; i++)
            _covariate[i] = Normal(random);
    }

    /// <summary>A method for sets.</summary>
    public delegate TestResult Method(in SetSample sets, TestOptions options, Scratch scratch);

    /// <summary>Runs a method on every endpoint, from dropping missing members on.</summary>
    public double Run(Method method, Scratch scratch) => Run(method, scratch, []);

    /// <summary>The same, with the covariate.</summary>
    public double RunAdjusted(Method method, Scratch scratch) => Run(method, scratch, _covariate);

    private double Run(Method method, Scratch scratch, ReadOnlySpan<double> covariates)
    {
        double sum = 0;
        foreach (double[] values in _values)
        {
            using Scratch.Frame frame = scratch.Open();
            SetSample sets = SetSample.Of(values, _starts, _isIndex, covariates, frame);
            sum += method(sets, TestOptions.Default, scratch).Statistic;
        }

        return sum;
    }

    private static double Normal(Random random) =>
        Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
}
