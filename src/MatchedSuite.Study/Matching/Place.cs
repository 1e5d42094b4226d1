namespace MatchedSuite.Study.Matching;

/// <summary>One place that every set has (a role, a visit) and the samples that stand in it, set by set.</summary>
/// <remarks>Positions point into a row of values in the order of the sample sheet's used rows (<see cref="Arrangement.Rows"/>).</remarks>
public sealed class Place
{
    private readonly int[] _first;
    private readonly int[]? _starts;
    private readonly int[]? _samples;

    /// <summary>A place with at most one sample a set; −1 where a set has none.</summary>
    public Place(string name, int[] samples)
    {
        Name = name;
        _first = samples;
    }

    /// <summary>A place where some sets have several samples, whose values are averaged.</summary>
    /// <param name="name">Name of the role or visit.</param>
    /// <param name="starts">For each set, where its samples begin in <paramref name="samples"/>; one entry more than there are sets.</param>
    /// <param name="samples">Positions, set after set.</param>
    public Place(string name, int[] starts, int[] samples)
    {
        Name = name;
        _first = [];
        _starts = starts;
        _samples = samples;
    }

    /// <summary>Name of the role or visit, as it stands in the data.</summary>
    public string Name { get; }

    /// <summary>True where some set has several samples in this place.</summary>
    public bool HasReplicates => _starts is not null;

    /// <summary>Number of sets.</summary>
    public int Sets => _starts is null ? _first.Length : _starts.Length - 1;

    /// <summary>True where a set has a sample here, with or without a value.</summary>
    public bool Has(int set) => _starts is null ? _first[set] >= 0 : _starts[set + 1] > _starts[set];

    /// <summary>Takes an endpoint's values from its row, one a set; NaN where the set has none. Several samples: the mean of those that have a value.</summary>
    public void Gather(ReadOnlySpan<double> row, Span<double> values)
    {
        if (_starts is null)
        {
            for (int set = 0; set < _first.Length; set++)
                values[set] = _first[set] < 0 ? double.NaN : row[_first[set]];
            return;
        }

        for (int set = 0; set + 1 < _starts.Length; set++)
            values[set] = MeanOf(row, _samples.AsSpan(_starts[set].._starts[set + 1]));
    }

    private static double MeanOf(ReadOnlySpan<double> row, ReadOnlySpan<int> samples)
    {
        double sum = 0;
        int count = 0;
        foreach (int sample in samples)
        {
            if (double.IsNaN(row[sample]))
                continue;
            sum += row[sample];
            count++;
        }

        return count == 0 ? double.NaN : count == 1 ? sum : sum / count;
    }
}
