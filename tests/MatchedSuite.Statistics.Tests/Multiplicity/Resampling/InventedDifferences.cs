using MatchedSuite.Statistics.Randomness;

namespace MatchedSuite.Statistics.Tests.Multiplicity.Resampling;

/// <summary>Invented differences of correlated endpoints, the same on every machine.</summary>
internal static class InventedDifferences
{
    /// <summary>Endpoint after endpoint; kind 0 complete, 1 missing sets, 2 whole numbers with ties and zeros, 3 all of these and scales from 1e-100 to 1e100.</summary>
    public static double[] Of(int endpoints, int sets, int kind, long seed)
    {
        var differences = new double[endpoints * sets];
        for (int j = 0; j < endpoints; j++)
        {
            double scale = kind == 3 ? Math.Pow(10, (j * 37 % 201) - 100) : 1;
            for (int i = 0; i < sets; i++)
            {
                double shared = Normal(seed, -1, i);
                double value = (shared + Normal(seed, j, i)) / Math.Sqrt(2) + (j % 7 == 0 ? 0.4 : 0);
                if (kind == 2 || (kind == 3 && j % 3 == 0))
                    value = Math.Round(value * 2);
                bool missing = kind % 2 == 1 && CounterRandom.Uniform(seed, RandomPurpose.Invention, j, 2 * sets + i) < 0.1 * (j % 4);
                differences[j * sets + i] = missing ? double.NaN : value * scale;
            }
        }

        return differences;
    }

    private static double Normal(long seed, int endpoint, int set) => Math.Sqrt(-2 * Math.Log(1 - CounterRandom.Uniform(seed, RandomPurpose.Invention, endpoint, 2 * set)))
        * Math.Cos(2 * Math.PI * CounterRandom.Uniform(seed, RandomPurpose.Invention, endpoint, 2 * set + 1));
}
