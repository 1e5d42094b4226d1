using BenchmarkDotNet.Attributes;
using MatchedSuite.Statistics.Multiplicity.Resampling;
using MatchedSuite.Statistics.Randomness;

namespace MatchedSuite.Benchmarks;

/// <summary>Step-down and single-step max-T over 10,000 endpoints × 200 pairs × 9,999 flips, from the differences on.</summary>
[MemoryDiagnoser]
public class MaxTBench
{
    private const int Endpoints = 10_000;
    private const int Pairs = 200;
    private DifferenceTable _table = null!;

    /// <summary>What the differences look like.</summary>
    public enum Shape
    {
        /// <summary>No value missing, no ties.</summary>
        Complete,

        /// <summary>Three in a hundred missing, each endpoint its own.</summary>
        Missing,

        /// <summary>Whole numbers with many ties and zeros.</summary>
        Whole,
    }

    /// <summary>The shape of this run.</summary>
    [ParamsAllValues]
    public Shape Differences { get; set; }

    /// <summary>Makes the differences: a sum of four uniform numbers each, one endpoint in twenty shifted.</summary>
    [GlobalSetup]
    public void Prepare()
    {
        var differences = new double[Endpoints * Pairs];
        for (int i = 0; i < differences.Length; i++)
        {
            double value = i / Pairs % 20 == 0 ? 0.3 : 0;
            for (int k = 0; k < 4; k++)
                value += CounterRandom.Uniform(1, RandomPurpose.Invention, i, k) - 0.5;
            differences[i] = Differences switch
            {
                Shape.Missing when i % 33 == 0 => double.NaN,
                Shape.Whole => Math.Round(3 * value),
                _ => value,
            };
        }

        _table = new DifferenceTable(differences, Pairs);
    }

    /// <summary>The whole adjustment.</summary>
    [Benchmark]
    public double StepDownAndSingleStep() => MaxT.Run(_table, new ResamplingOptions { Seed = 7 }).CriticalValue;
}
