namespace MatchedSuite.Statistics.Multiplicity.Resampling;

/// <summary>The largest w of each flip over all endpoints: how many reach each threshold, and the critical value.</summary>
internal sealed class OrderedMaxima
{
    private readonly double[] _maxima;
    private readonly Thresholds _thresholds;
    private readonly Dictionary<int, double> _exact = [];
    private readonly int _criticalRank;
    private readonly (double Low, double High) _criticalBand;

    /// <summary>Takes the maxima from whole-number sums.</summary>
    /// <param name="maxima">One for each flip.</param>
    /// <param name="thresholds">The thresholds.</param>
    /// <param name="level">Familywise level of the critical value.</param>
    public OrderedMaxima(double[] maxima, Thresholds thresholds, double level)
    {
        _maxima = maxima;
        _thresholds = thresholds;

        // (1 + b)/(1 + B) <= level lets at most this many flips reach a statistic; the next largest maximum is critical.
        _criticalRank = (int)Math.Floor(level * (1.0 + maxima.Length) * (1 + 1e-12)) - 1;
        if (_criticalRank < 0 || _criticalRank >= maxima.Length)
            return;
        double[] ascending = [.. maxima];
        Array.Sort(ascending);
        double critical = ascending[^(_criticalRank + 1)];
        var (possibly, surely) = thresholds.Around(critical);
        _criticalBand = (thresholds.Around(possibly).Possibly, thresholds.Around(surely).Surely);
    }

    /// <summary>w that must be exceeded for a single-step p-value at or below the level.</summary>
    public double Critical { get; private set; } = double.PositiveInfinity;

    /// <summary>Asks for the exact maxima that whole-number sums cannot place.</summary>
    public void AskOpenOnes(ExactFlips exact)
    {
        for (int flip = 0; flip < _maxima.Length; flip++)
        {
            int surely = CountAtMost(_thresholds.Surely, _maxima[flip]);
            if (CountAtMost(_thresholds.Possibly, _maxima[flip]) > surely)
                exact.AskMaximum(flip, _thresholds.Possibly[surely]);
            if (IsNearCritical(flip))
                exact.AskMaximum(flip, LowestOfTheLargest(_maxima[flip]));
        }
    }

    /// <summary>Takes the exact maxima.</summary>
    public void Settle(Dictionary<int, double> exact)
    {
        foreach (var (flip, largest) in exact)
            _exact[flip] = largest;
        if (_criticalRank < 0 || _criticalRank >= _maxima.Length)
            return;
        int above = _maxima.Count(largest => largest > _criticalBand.High);
        double[] near = [.. Enumerable.Range(0, _maxima.Length).Where(IsNearCritical).Select(flip => _exact[flip]).OrderDescending()];
        Critical = near[_criticalRank - above];
    }

    /// <summary>For each position, the flips whose largest w reaches its threshold.</summary>
    public int[] CountsReaching()
    {
        var reached = new int[_thresholds.Exact.Length + 1];
        for (int flip = 0; flip < _maxima.Length; flip++)
        {
            int surely = CountAtMost(_thresholds.Surely, _maxima[flip]);
            int possibly = CountAtMost(_thresholds.Possibly, _maxima[flip]);
            while (surely < possibly && _exact[flip] >= _thresholds.Exact[surely])
                surely++;
            reached[surely]++;
        }

        for (int position = reached.Length - 2; position >= 0; position--)
            reached[position] += reached[position + 1];
        return reached[1..];
    }

    private bool IsNearCritical(int flip) => _maxima[flip] >= _criticalBand.Low && _maxima[flip] <= _criticalBand.High && _criticalRank >= 0;

    // The exact maximum may lie a margin lower, and the endpoint that attains it a margin lower still by its whole-number sums.
    private double LowestOfTheLargest(double maximum) => _thresholds.Around(_thresholds.Around(maximum).Possibly).Possibly;

    // Number of ascending thresholds that are at most w.
    private static int CountAtMost(double[] ascending, double w)
    {
        int low = 0;
        int high = ascending.Length;
        while (low < high)
        {
            int middle = low + ((high - low) >> 1);
            if (ascending[middle] <= w)
                low = middle + 1;
            else
                high = middle;
        }

        return low;
    }
}
