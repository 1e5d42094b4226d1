namespace MatchedSuite.Statistics.Pairs;

/// <summary>The n(n+1)/2 averages of two differences (each with itself too), in order, without listing them.</summary>
/// <remarks>Source: Walsh (1949), Annals of Mathematical Statistics 20, 64-81. Ranks are selected by <see cref="PairwiseSumSelection"/>.</remarks>
internal readonly ref struct WalshAverages
{
    // For normal differences the averages stand at their centre this many interquartile ranges apart, times their number.
    private const double CentralSpacing = 1.314;

    private readonly ReadOnlySpan<double> _halves;
    private readonly PairwiseSumSelection _selection;
    private readonly double _spacing;
    private readonly double _centre;

    private WalshAverages(ReadOnlySpan<double> sorted, ReadOnlySpan<double> halves, in Scratch.Frame frame)
    {
        _halves = halves;
        _selection = new PairwiseSumSelection(halves, frame);
        int n = sorted.Length;
        // First guesses only: they set how soon a selection ends, never what it gives.
        double lowerQuartile = sorted[n / 4], upperQuartile = sorted[n - 1 - (n / 4)];
        _spacing = CentralSpacing * (upperQuartile - lowerQuartile) / Count;
        _centre = 0.25 * (lowerQuartile + upperQuartile + sorted[n / 2] + sorted[(n - 1) / 2]);
    }

    /// <summary>Number of averages.</summary>
    public long Count => (long)_halves.Length * (_halves.Length + 1) / 2;

    /// <summary>The averages of at least one difference.</summary>
    /// <param name="sorted">Differences in ascending order, finite.</param>
    /// <param name="frame">Working memory that outlives the averages.</param>
    public static WalshAverages Of(ReadOnlySpan<double> sorted, in Scratch.Frame frame)
    {
        Span<double> halves = frame.Doubles(sorted.Length);
        for (int i = 0; i < sorted.Length; i++)
            halves[i] = 0.5 * sorted[i];
        return new WalshAverages(sorted, halves, frame);
    }

    /// <summary>Median of all averages: the middle one, or halfway between the two middle ones.</summary>
    public double Median()
    {
        long middle = (Count + 1) / 2;
        double lower = _selection.Select(middle, _centre, _spacing);
        return Count % 2 == 1 ? lower : (0.5 * lower) + (0.5 * Following(lower, middle));
    }

    /// <summary>The average of rank <paramref name="rank"/>, counted from 1 for the smallest.</summary>
    /// <param name="rank">Between 1 and <see cref="Count"/>.</param>
    /// <param name="median">The median of all averages: the search starts from it.</param>
    public double Select(long rank, double median) =>
        _selection.Select(rank, median + (_spacing * (rank - (0.5 * (Count + 1)))), _spacing);

    // The average of the next rank: the same again, or the smallest of those above.
    private double Following(double average, long rank)
    {
        long atMost = 0;
        double next = double.PositiveInfinity;
        int end = _halves.Length;
        for (int row = 0; row < _halves.Length; row++)
        {
            while (end > row && _halves[row] + _halves[end - 1] > average)
                end--;
            int firstAbove = Math.Max(end, row);
            atMost += firstAbove - row;
            if (firstAbove < _halves.Length)
                next = Math.Min(next, _halves[row] + _halves[firstAbove]);
        }

        return atMost > rank ? average : next;
    }
}
