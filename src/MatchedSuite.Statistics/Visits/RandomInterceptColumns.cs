namespace MatchedSuite.Statistics.Visits;

/// <summary>The rows of a random-intercept model's design, read subject by subject, with what is large and common taken off first.</summary>
/// <remarks>
/// <para>Group columns: one indicator a visit, or the constant. Measured columns: time of a line, covariates, last the
/// endpoint. Measured columns come less their value in the first observation; the endpoint less the subject's own first value
/// (given apart) and less the differences between the means of the groups, over a power of two that makes its spread about
/// 1: so what a level, the subjects or the visits explain costs no digit, and no square over- or underflows.</para>
/// </remarks>
internal readonly ref struct RandomInterceptColumns
{
    private readonly VisitSample _sample;
    private readonly int _times;
    private readonly Span<double> _origins;

    private RandomInterceptColumns(scoped in VisitSample sample, VisitTerm term, Span<double> origins, Span<double> levels, in Scratch.Frame frame)
    {
        _sample = sample;
        _times = term == VisitTerm.Line ? 1 : 0;
        _origins = origins;
        Levels = levels;
        FindOrigins();
        Span<int> counts = frame.Integers(levels.Length);
        (LargestMagnitude, double spread) = FindLevels(counts);
        FewestInGroup = counts[0];
        foreach (int count in counts)
            FewestInGroup = Math.Min(FewestInGroup, count);
        Scale = spread > 0 ? Math.ScaleB(1, Math.ILogB(spread)) : 1;
    }

    /// <summary>Group columns.</summary>
    public int Groups => Levels.Length;

    /// <summary>Measured columns, the endpoint included.</summary>
    public int Measured => _origins.Length;

    /// <summary>What was taken off the measured columns; the endpoint's, in its own unit, comes last.</summary>
    public ReadOnlySpan<double> Origins => _origins;

    /// <summary>Mean of the first group beside the origin, then what the means of the other groups are above it; in the endpoint's unit.</summary>
    public Span<double> Levels { get; }

    /// <summary>Endpoint units that are 1 in the rows; a power of two.</summary>
    public double Scale { get; }

    /// <summary>Observations of the group that has the fewest.</summary>
    public int FewestInGroup { get; }

    /// <summary>The largest absolute value of the endpoint, for judging what is rounding.</summary>
    public double LargestMagnitude { get; }

    /// <summary>The columns of a sample.</summary>
    public static RandomInterceptColumns Of(scoped in VisitSample sample, VisitTerm term, in Scratch.Frame frame)
    {
        int groups = term == VisitTerm.Means ? sample.Visits : 1, times = term == VisitTerm.Line ? 1 : 0;
        return new RandomInterceptColumns(sample, term, frame.Doubles(times + sample.CovariateCount + 1), frame.Doubles(groups), frame);
    }

    /// <summary>Reads one subject's observations.</summary>
    /// <param name="subject">Place of the subject.</param>
    /// <param name="rows">Room for the measured columns of every visit; filled row after row.</param>
    /// <param name="present">Room for every visit; filled with the visits observed.</param>
    /// <param name="level">What the subject's first value is above origin and level, in units of <see cref="Scale"/>.</param>
    /// <returns>Number of observations.</returns>
    public int Read(int subject, Span<double> rows, Span<int> present, out double level)
    {
        int size = 0, to = 0, covariates = _sample.CovariateCount, visits = _sample.Visits;
        double first = double.NaN;
        for (int j = 0; j < visits; j++)
        {
            int at = subject * visits + j;
            if (!IsObserved(at))
                continue;
            present[size++] = j;
            if (size == 1)
                first = _sample.Values[at];
            if (_times == 1)
                rows[to++] = _sample.Times[j] - _origins[0];
            for (int q = 0; q < covariates; q++)
                rows[to++] = _sample.Covariates[at * covariates + q] - _origins[_times + q];
            rows[to++] = (_sample.Values[at] - first - (Levels.Length > 1 && j > 0 ? Levels[j] : 0)) / Scale;
        }

        level = (first - _origins[^1] - Levels[0]) / Scale;
        return size;
    }

    private int GroupOf(int visit) => Levels.Length > 1 ? visit : 0;

    private bool IsObserved(int at)
    {
        if (double.IsNaN(_sample.Values[at]))
            return false;
        int covariates = _sample.CovariateCount;
        for (int q = 0; q < covariates; q++)
        {
            if (double.IsNaN(_sample.Covariates[at * covariates + q]))
                return false;
        }

        return true;
    }

    // The first observation is a good enough origin for a first step: what is left is of the size of the spread.
    private void FindOrigins()
    {
        _origins.Clear();
        int covariates = _sample.CovariateCount;
        for (int at = 0; at < _sample.Values.Length; at++)
        {
            if (!IsObserved(at))
                continue;
            if (_times == 1)
                _origins[0] = _sample.Times[at % _sample.Visits];
            _sample.Covariates.Slice(at * covariates, covariates).CopyTo(_origins[_times..]);
            _origins[^1] = _sample.Values[at];
            return;
        }
    }

    private (double Largest, double Spread) FindLevels(Span<int> counts)
    {
        counts.Clear();
        Levels.Clear();
        double largest = 0, spread = 0;
        for (int at = 0, visit = 0; at < _sample.Values.Length; at++, visit = visit + 1 == _sample.Visits ? 0 : visit + 1)
        {
            if (!IsObserved(at))
                continue;
            double value = _sample.Values[at], deviation = value - _origins[^1];
            largest = Math.Max(largest, Math.Abs(value));
            spread = Math.Max(spread, Math.Abs(deviation));
            Levels[GroupOf(visit)] += deviation;
            counts[GroupOf(visit)]++;
        }

        for (int group = 0; group < counts.Length; group++)
        {
            Levels[group] = counts[group] > 0 ? Levels[group] / counts[group] : 0;
            if (group > 0)
                Levels[group] -= Levels[0];
        }

        return (largest, spread);
    }
}
