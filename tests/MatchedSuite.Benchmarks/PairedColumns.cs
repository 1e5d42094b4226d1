namespace MatchedSuite.Benchmarks;

/// <summary>Invented endpoints on pairs, many enough that the processor cannot learn one by heart.</summary>
internal sealed class PairedColumns
{
    /// <summary>Number of endpoints.</summary>
    public const int Endpoints = 256;

    private readonly double[][] _index = new double[Endpoints][];
    private readonly double[][] _reference = new double[Endpoints][];

    /// <summary>Endpoints of <paramref name="pairs"/> values, rounded to <paramref name="decimals"/> places.</summary>
    public PairedColumns(int pairs, int decimals)
    {
        var random = new Random(20260301);
        for (int endpoint = 0; endpoint < Endpoints; endpoint++)
        {
            _index[endpoint] = new double[pairs];
            _reference[endpoint] = new double[pairs];
            for (int pair = 0; pair < pairs; pair++)
            {
                double shared = 10 + Normal(random);
                _index[endpoint][pair] = Math.Round(shared + Normal(random) + 0.1, decimals);
                _reference[endpoint][pair] = Math.Round(shared + Normal(random), decimals);
            }
        }
    }

    /// <summary>Values of the index role.</summary>
    public ReadOnlySpan<double> Index(int endpoint) => _index[endpoint];

    /// <summary>Values of the reference role.</summary>
    public ReadOnlySpan<double> Reference(int endpoint) => _reference[endpoint];

    // Box and Muller (1958).
    private static double Normal(Random random) =>
        Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
}
