using MatchedSuite.Statistics.Multiplicity.Resampling;

namespace MatchedSuite.Statistics.Tests.Multiplicity.Resampling;

/// <summary>Max-T over relabelings as its definition reads, one labelling and one endpoint at a time: the twin of the fast one.</summary>
internal static class PlainRelabelMaxT
{
    private const double TieTolerance = 1e-9;

    // What rounding can leave of a sum of zero, in standard deviations.
    private const double ZeroTolerance = 1e-11;

    /// <summary>The labellings of a run beside the observed one.</summary>
    public static List<bool[]> Labellings(RelabelBlocks blocks, ResamplingOptions options)
    {
        var relabelings = new CommonRelabelings(blocks, options.Seed, options.Resamples);
        var words = new ulong[relabelings.Words];
        var labellings = new List<bool[]>();
        for (int pattern = 0; pattern < relabelings.Count; pattern++)
        {
            relabelings.Fill(pattern, words);
            var labels = new bool[blocks.Members];
            for (int i = 0; i < labels.Length; i++)
                labels[i] = blocks.IsIndex[i] ^ ((words[i / 64] >> (i % 64)) & 1) == 1;
            labellings.Add(labels);
        }

        return labellings;
    }

    /// <summary>Every labelling that keeps the numbers of each block, the observed one included: all sequences of labels, sieved.</summary>
    public static List<bool[]> AllLabellings(RelabelBlocks blocks)
    {
        var labellings = new List<bool[]>();
        for (int code = 0; code < 1 << blocks.Members; code++)
        {
            bool[] labels = [.. Enumerable.Range(0, blocks.Members).Select(i => (code >> i & 1) == 1)];
            bool keeps = true;
            for (int block = 0; block < blocks.Count; block++)
                keeps &= labels[blocks.Starts[block]..blocks.Starts[block + 1]].Count(label => label) == blocks.IndexCounts[block];
            if (keeps)
                labellings.Add(labels);
        }

        return labellings;
    }

    /// <summary>b of every endpoint over some labellings; −1 where there is nothing to relabel.</summary>
    public static (int[] StepDown, int[] SingleStep) Counts(double[] values, RelabelBlocks blocks, Sides sides, List<bool[]> labellings)
    {
        int endpoints = values.Length / blocks.Members;
        double[] observed = Statistics(values, blocks, sides, blocks.IsIndex);
        int[] order = [.. Enumerable.Range(0, endpoints).Where(j => !double.IsNaN(observed[j])).OrderBy(j => observed[j])];
        int[] stepDown = Enumerable.Repeat(-1, endpoints).ToArray();
        int[] singleStep = Enumerable.Repeat(-1, endpoints).ToArray();
        foreach (int j in order)
            stepDown[j] = singleStep[j] = 0;
        foreach (bool[] labels in labellings)
        {
            double[] relabelled = Statistics(values, blocks, sides, labels);
            double largest = double.NegativeInfinity;
            foreach (int j in order)
            {
                largest = Math.Max(largest, relabelled[j]);
                if (Reaches(largest, observed[j]))
                    stepDown[j]++;
            }

            foreach (int j in order)
            {
                if (Reaches(largest, observed[j]))
                    singleStep[j]++;
            }
        }

        for (int place = order.Length - 2; place >= 0; place--)
            stepDown[order[place]] = Math.Max(stepDown[order[place]], stepDown[order[place + 1]]);
        return (stepDown, singleStep);
    }

    private static double[] Statistics(double[] values, RelabelBlocks blocks, Sides sides, ReadOnlySpan<bool> labels)
    {
        var statistics = new double[values.Length / blocks.Members];
        for (int j = 0; j < statistics.Length; j++)
        {
            double unit = values.Skip(j * blocks.Members).Take(blocks.Members).Where(x => !double.IsNaN(x)).Select(Math.Abs).DefaultIfEmpty(1).Max();
            double u = 0, variance = 0;
            for (int block = 0; block < blocks.Count; block++)
            {
                int start = blocks.Starts[block];
                double n = blocks.Starts[block + 1] - start;
                double k = blocks.IndexCounts[block];
                double[] x = [.. values.Skip((j * blocks.Members) + start).Take((int)n).Select(value => value / unit)];
                double[] present = [.. x.Where(value => !double.IsNaN(value))];
                if (k == 0 || k == n || present.Length == 0 || present.Max() == present.Min())
                    continue;
                double mean = present.Average();
                for (int i = 0; i < x.Length; i++)
                {
                    double centred = double.IsNaN(x[i]) ? 0 : x[i] - mean;
                    u += labels[start + i] ? centred : 0;
                    variance += k * (n - k) / (n * (n - 1)) * centred * centred;
                }
            }

            double directed = sides == Sides.Less ? -u : u;
            statistics[j] = variance == 0 ? double.NaN : (sides == Sides.Two ? Math.Abs(u) : directed) / Math.Sqrt(variance);
        }

        return statistics;
    }

    private static bool Reaches(double statistic, double observed) =>
        statistic >= observed - TieTolerance * Math.Abs(observed) - ZeroTolerance;
}
