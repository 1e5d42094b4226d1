using System.Numerics;

namespace MatchedSuite.EndToEnd.Tests.Program;

/// <summary>Step-down p-values of max-t over every labelling of the members of blocks, each written out: what the program must find.</summary>
/// <param name="values">One row an endpoint, one value a member; NaN where missing.</param>
/// <param name="blocks">The members of each block.</param>
/// <param name="isIndex">The labels as they are.</param>
internal sealed class WrittenOutLabellings(double[][] values, int[][] blocks, bool[] isIndex)
{
    private readonly List<double[]>[] _shares = [.. blocks.Select(block => SharesOf(values, block, block.Count(member => isIndex[member])))];
    private readonly int[] _reached = new int[values.Length];
    private double[] _observed = [];
    private int[] _order = [];

    /// <summary>Number of labellings, the observed one included.</summary>
    public int Count { get; private set; }

    /// <summary>The adjusted p-value of each endpoint, two-sided.</summary>
    public double[] StepDown()
    {
        double[] deviations = Deviations();
        _observed = Statistics(Observed(), deviations);
        _order = [.. Enumerable.Range(0, values.Length).OrderBy(endpoint => _observed[endpoint])];
        Follow(0, new double[values.Length], deviations);
        var p = new double[values.Length];
        double largest = 0;
        foreach (int endpoint in _order.Reverse())
            p[endpoint] = largest = Math.Max(largest, _reached[endpoint] / (double)Count);
        return p;
    }

    private void Follow(int block, double[] sums, double[] deviations)
    {
        if (block < blocks.Length)
        {
            foreach (double[] share in _shares[block])
                Follow(block + 1, [.. sums.Zip(share, (sum, part) => sum + part)], deviations);
            return;
        }

        Count++;
        double[] statistics = Statistics(sums, deviations);
        double largest = 0;
        foreach (int endpoint in _order)
        {
            largest = Math.Max(largest, statistics[endpoint]);
            if (largest >= _observed[endpoint] - 1e-9)
                _reached[endpoint]++;
        }
    }

    private static double[] Statistics(double[] sums, double[] deviations) => [.. sums.Zip(deviations, (sum, deviation) => Math.Abs(sum) / deviation)];

    private double[] Observed() =>
        [.. values.Select(row => blocks.Sum(block => block.Where(member => isIndex[member]).Sum(member => Centred(row, block, member))))];

    // Of the sum over all labellings, from the labellings themselves: blocks are labelled independently.
    private double[] Deviations() =>
        [.. values.Select((_, endpoint) => Math.Sqrt(_shares.Sum(shares => shares.Average(share => share[endpoint] * share[endpoint]))))];

    private static List<double[]> SharesOf(double[][] values, int[] block, int index) =>
    [
        .. Enumerable.Range(0, 1 << block.Length).Where(labels => BitOperations.PopCount((uint)labels) == index).Select(labels =>
            values.Select(row => block.Where((_, place) => (labels >> place & 1) == 1).Sum(member => Centred(row, block, member))).ToArray()),
    ];

    private static double Centred(double[] row, int[] block, int member) =>
        double.IsNaN(row[member]) ? 0 : row[member] - block.Select(other => row[other]).Where(value => !double.IsNaN(value)).Average();
}
