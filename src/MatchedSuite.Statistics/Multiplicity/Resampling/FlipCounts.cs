namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>One endpoint's signed sums under every flip, and how many flips reach each of them: the marginal p-value of each flip.</summary>
/// <remarks>
/// Sums are tabulated by eight sets in double precision and added in one fixed order. The data as they are count as one more flip,
/// which stands last.
/// </remarks>
internal sealed class FlipCounts
{
    private const int GroupSets = 8;
    private const int Patterns = 1 << GroupSets;

    private readonly ScaledEndpoints _endpoints;
    private readonly byte[] _patterns;
    private readonly int _groups;
    private readonly double[] _differences;
    private readonly double[] _tables;
    private readonly double[] _sums;
    private readonly int[] _flipOf;

    /// <summary>Working memory for one thread.</summary>
    /// <param name="endpoints">The endpoints.</param>
    /// <param name="patterns">The flips by <see cref="PatternsOf"/>; shared between threads.</param>
    public FlipCounts(ScaledEndpoints endpoints, byte[] patterns)
    {
        _endpoints = endpoints;
        _patterns = patterns;
        _groups = Groups(endpoints.Sets);
        _differences = new double[_groups * GroupSets];
        _tables = new double[_groups * Patterns];
        _sums = new double[patterns.Length / _groups + 1];
        _flipOf = new int[_sums.Length];
    }

    /// <summary>One byte for every eight sets of every flip.</summary>
    public static byte[] PatternsOf(ISignPatterns flips, int sets)
    {
        int groups = Groups(sets);
        var patterns = new byte[groups * flips.Count];
        var words = new ulong[flips.Words];
        for (int flip = 0; flip < flips.Count; flip++)
        {
            flips.Fill(flip, words);
            for (int group = 0; group < groups; group++)
                patterns[flip * groups + group] = (byte)(words[group >> 3] >> ((group & 7) * GroupSets));
        }

        return patterns;
    }

    /// <summary>How many flips, the data as they are included, reach the sum of the data.</summary>
    public int Observed(int place)
    {
        Sum(place);
        double tied = _endpoints.ScaleAt(place).TiedSum(_sums[^1]);
        int reached = 0;
        foreach (double sum in _sums)
        {
            if (sum >= tied)
                reached++;
        }

        return reached;
    }

    /// <summary>Writes, for every flip, how many flips, the data as they are included, reach its sum.</summary>
    public void OfEveryFlip(int place, Span<int> counts)
    {
        Sum(place);
        for (int flip = 0; flip < _flipOf.Length; flip++)
            _flipOf[flip] = flip;
        Array.Sort(_sums, _flipOf);
        ref readonly var scale = ref _endpoints.ScaleAt(place);
        int below = 0;
        for (int at = 0; at < _sums.Length; at++)
        {
            double tied = scale.TiedSum(_sums[at]);
            while (_sums[below] < tied)
                below++;
            if (_flipOf[at] < counts.Length)
                counts[_flipOf[at]] = _sums.Length - below;
        }
    }

    private static int Groups(int sets) => (sets + GroupSets - 1) / GroupSets;

    private void Sum(int place)
    {
        _endpoints.Read(place, _differences.AsSpan(0, _endpoints.Sets));
        for (int group = 0; group < _groups; group++)
            Tabulate(_differences.AsSpan(group * GroupSets, GroupSets), _tables.AsSpan(group * Patterns, Patterns));
        bool twoSided = _endpoints.Options.Sides == Sides.Two;
        for (int flip = 0; flip < _sums.Length; flip++)
        {
            bool isData = flip == _sums.Length - 1;
            double sum = 0;
            for (int group = 0; group < _groups; group++)
                sum += _tables[group * Patterns + (isData ? 0 : _patterns[flip * _groups + group])];
            _sums[flip] = twoSided ? Math.Abs(sum) : sum;
        }
    }

    private static void Tabulate(ReadOnlySpan<double> differences, Span<double> table)
    {
        table[0] = 0;
        foreach (double difference in differences)
            table[0] += difference;
        for (int set = 0; set < GroupSets; set++)
        {
            int half = 1 << set;
            for (int pattern = 0; pattern < half; pattern++)
                table[half + pattern] = table[pattern] - 2 * differences[set];
        }
    }
}
