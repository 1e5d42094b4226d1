namespace MatchedSuite.Statistics.Sets;

/// <summary>Ranks of values centred on their set's mean, for any shift taken off the index role.</summary>
/// <remarks>
/// Values tie by the decimal rule and take the middle rank of their group. The order found for one shift is the start for the next,
/// so that near shifts cost little more than a pass.
/// </remarks>
internal ref struct AlignedRanks
{
    // Moving an entry one place is cheap, but a wholly different order is sorted anew.
    private const int MovesBeforeSorting = 16;

    private readonly SetSample _sets;
    private readonly Span<double> _aligned;
    private readonly Span<double> _slopes;
    private readonly Span<double> _roundings;
    private readonly Span<double> _keys;
    private readonly Span<int> _setOf;
    private readonly Span<int> _order;
    private readonly Span<long> _sums;
    private readonly Span<long> _squares;
    private readonly Span<long> _indexSums;

    /// <summary>Centres the values.</summary>
    /// <param name="sets">At least one set.</param>
    /// <param name="frame">Working memory that outlives the ranks.</param>
    public AlignedRanks(in SetSample sets, in Scratch.Frame frame)
    {
        _sets = sets;
        int members = sets.Members;
        _aligned = frame.Doubles(members);
        _slopes = frame.Doubles(members);
        _roundings = frame.Doubles(members);
        _keys = frame.Doubles(members);
        _setOf = frame.Integers(members);
        _order = frame.Integers(members);
        _sums = frame.Longs(sets.Sets);
        _squares = frame.Longs(sets.Sets);
        _indexSums = frame.Longs(sets.Sets);
        int largestSet = 0;
        for (int s = 0; s < sets.Sets; s++)
        {
            Align(s, sets.Starts[s], sets.Starts[s + 1]);
            largestSet = Math.Max(largestSet, sets.Starts[s + 1] - sets.Starts[s]);
        }

        double smallest = _aligned[0], largest = _aligned[0];
        for (int i = 0; i < members; i++)
        {
            _order[i] = i;
            smallest = Math.Min(smallest, _aligned[i]);
            largest = Math.Max(largest, _aligned[i]);
        }

        // Against a reference an index value moves by at least one member's share of the shift.
        Range = largest - smallest;
        Reach = Range * largestSet;
    }

    /// <summary>Largest centred value minus the smallest.</summary>
    public double Range { get; }

    /// <summary>A shift beyond which every index value is past every reference value.</summary>
    public double Reach { get; }

    /// <summary>True where the last ranking gave members of some set different ranks.</summary>
    public bool Vary { get; private set; }

    /// <summary>True where the last ranking had tied values.</summary>
    public bool Ties { get; private set; }

    /// <summary>
    /// Ranks the values after taking <paramref name="shift"/> off the index role and answers how far the sum of the index role's
    /// ranks lies above its mean over all relabelings within sets, in standard deviations; 0 where no rank varies within a set.
    /// </summary>
    public double StandardisedAt(double shift)
    {
        Sort(shift);
        Rank();
        double excess = 0, variance = 0;
        for (int s = 0; s < _sets.Sets; s++)
        {
            // Doubled ranks are whole numbers, so the numerators are exact.
            long n = _sets.Starts[s + 1] - _sets.Starts[s], index = _sets.IndexCounts[s];
            excess += (double)((n * _indexSums[s]) - (index * _sums[s])) / n;
            double spread = (double)((n * _squares[s]) - (_sums[s] * _sums[s]));
            variance += index * (n - index) * spread / ((double)n * n * (n - 1));
        }

        Vary = variance > 0;
        return Vary ? excess / Math.Sqrt(variance) : 0;
    }

    private readonly void Align(int set, int from, int to)
    {
        ReadOnlySpan<double> values = _sets.Values[from..to];
        double origin = values[0], sum = 0, size = 0;
        foreach (double value in values)
        {
            sum += value - origin;
            size = Math.Max(size, Math.Abs(value));
        }

        double mean = sum / values.Length;
        double share = (double)_sets.IndexCounts[set] / values.Length;
        for (int i = 0; i < values.Length; i++)
        {
            _aligned[from + i] = values[i] - origin - mean;
            _slopes[from + i] = (i < _sets.IndexCounts[set] ? 1 : 0) - share;
            _roundings[from + i] = DecimalRounding.Of(size);
            _setOf[from + i] = set;
        }
    }

    private readonly void Sort(double shift)
    {
        Span<double> keys = _keys;
        Span<int> order = _order;
        for (int at = 0; at < order.Length; at++)
            keys[at] = _aligned[order[at]] - (shift * _slopes[order[at]]);
        long moves = (long)MovesBeforeSorting * keys.Length;
        for (int at = 1; at < keys.Length; at++)
        {
            double key = keys[at];
            int member = order[at], hole = at;
            for (; hole > 0 && keys[hole - 1] > key; hole--)
            {
                keys[hole] = keys[hole - 1];
                order[hole] = order[hole - 1];
            }

            keys[hole] = key;
            order[hole] = member;
            moves -= at - hole;
            if (moves < 0)
            {
                keys.Sort(order);
                return;
            }
        }
    }

    private void Rank()
    {
        _sums.Clear();
        _squares.Clear();
        _indexSums.Clear();
        Ties = false;
        for (int first = 0; first < _keys.Length;)
        {
            double rounding = _roundings[_order[first]];
            int end = first + 1;
            while (end < _keys.Length && _keys[end] - _keys[first] <= Math.Max(rounding, _roundings[_order[end]]))
                rounding = Math.Max(rounding, _roundings[_order[end++]]);
            Ties |= end > first + 1;
            long doubled = first + 1 + end;
            for (; first < end; first++)
            {
                int set = _setOf[_order[first]];
                _sums[set] += doubled;
                _squares[set] += doubled * doubled;
                if (_slopes[_order[first]] > 0)
                    _indexSums[set] += doubled;
            }
        }
    }
}
