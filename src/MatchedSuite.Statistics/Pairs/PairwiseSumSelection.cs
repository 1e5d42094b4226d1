namespace MatchedSuite.Statistics.Pairs;

/// <summary>
/// Selects one rank among the sums h(i) + h(j), i ≤ j, of ascending values h, or a(i) + b(j) of two ascending columns, in
/// O(n log n) and without randomness.
/// </summary>
/// <remarks>
/// <para>The sums form a matrix that ascends along rows and columns, so those below a value are bounded by a staircase that one
/// walk of O(n) finds. Candidates are cut by such staircases until few are left, and those are sorted. The cutting values follow
/// the secant through the last two counts, aimed a little beyond the rank so that it is soon enclosed; where that stalls
/// (many equal sums, long tails), the weighted median of the rows' medians cuts at least a quarter.</para>
/// <para>Sources: Johnson and Mizoguchi (1978), SIAM Journal on Computing 7, 147-153; Monahan (1984), ACM Transactions on
/// Mathematical Software 10, 265-270.</para>
/// </remarks>
internal readonly ref struct PairwiseSumSelection
{
    // Sorting this many candidates costs about as much as one more walk.
    private const int SortedAtOnce = 48;

    // How far beyond the rank a cut aims: past the noise of the counts, and past an eighth of the step.
    private const double LeastOvershoot = 8;
    private const double OvershootPerStep = 0.125;

    // A cut this many candidates a row from the last one is sought from the last one.
    private const double NearPerRow = 2;

    // Cuts that may remove less than a quarter before the sure way is taken.
    private const int PatientCuts = 2;

    private readonly PairwiseSumStaircase _sums;
    private readonly Span<int> _weights;
    private readonly Span<double> _rowMedians;
    private readonly Span<double> _few;

    /// <summary>Prepares selections over the sums h(i) + h(j), i ≤ j, of ascending <paramref name="halves"/>, in the memory of <paramref name="frame"/>.</summary>
    public PairwiseSumSelection(ReadOnlySpan<double> halves, in Scratch.Frame frame)
        : this(new PairwiseSumStaircase(halves, frame), frame)
    {
    }

    /// <summary>Prepares selections over all sums of a row and a column, both ascending, in the memory of <paramref name="frame"/>.</summary>
    public PairwiseSumSelection(ReadOnlySpan<double> rows, ReadOnlySpan<double> columns, in Scratch.Frame frame)
        : this(new PairwiseSumStaircase(rows, columns, frame), frame)
    {
    }

    private PairwiseSumSelection(PairwiseSumStaircase sums, in Scratch.Frame frame)
    {
        _sums = sums;
        int rows = sums.Left.Length;
        _weights = frame.Integers(rows);
        _rowMedians = frame.Doubles(rows);
        _few = frame.Doubles(SortedAtOnce);
    }

    /// <summary>The sum of rank <paramref name="rank"/>, counted from 1 for the smallest.</summary>
    /// <param name="rank">Between 1 and the number of sums.</param>
    /// <param name="guess">Where to cut first.</param>
    /// <param name="spacing">Guessed distance between neighbouring sums near the rank.</param>
    public double Select(long rank, double guess, double spacing)
    {
        var open = Everything();
        double cut = guess, lastValue = double.NaN, lastCount = double.NaN;
        var walk = PairwiseSumStaircase.Walk.Whole;
        int idle = 0;
        while (open.Candidates > SortedAtOnce)
        {
            long before = open.Candidates;
            if (cut > open.Low && cut <= open.High)
            {
                open = CutAt(cut, rank, open, walk, out long count);
                double secant = (cut - lastValue) / (count - lastCount);
                if (secant > 0 && double.IsFinite(secant))
                    spacing = secant;
                (lastValue, lastCount) = (cut, count);
                double step = rank - 0.5 - count;
                double overshoot = (LeastOvershoot + (OvershootPerStep * Math.Abs(step))) * (1 << idle);
                cut += spacing * (step + Math.CopySign(overshoot, step));
                bool isNear = Math.Abs(step) + overshoot <= NearPerRow * (open.EndRow - open.FirstRow);
                walk = !isNear ? PairwiseSumStaircase.Walk.Whole : step > 0 ? PairwiseSumStaircase.Walk.UpFromLeft : PairwiseSumStaircase.Walk.DownFromRight;
            }

            idle = open.Candidates > before - (before / 4) ? idle + 1 : 0;
            if (idle == 0)
                continue;
            open = Tighten(open);
            if (open.Low == open.High)
                return open.Low;
            if (!(cut > open.Low && cut <= open.High))
                cut = open.Low + ((open.High - open.Low) * ((rank - open.Below - 0.5) / open.Candidates));
            if (idle <= PatientCuts)
                continue;

            double middle = MiddleRowMedian(open);
            open = CutAt(middle, rank, open, PairwiseSumStaircase.Walk.Whole, out _);
            if (open.Low == middle)
                open = CutAt(Math.BitIncrement(middle), rank, open, PairwiseSumStaircase.Walk.Whole, out _);
            if (open.Low == middle)
                return middle;
            idle = 0;
        }

        return SelectAmongFew(rank, open);
    }

    private Bracket Everything()
    {
        _sums.Open();
        int rows = _sums.Left.Length;
        return new Bracket(0, rows, 0, _sums.Count, _sums.Sum(0, 0), _sums.Sum(rows - 1, _sums.Columns - 1));
    }

    // Splits the candidates into those below the value and the others, and keeps the part that holds the rank.
    private Bracket CutAt(double value, long rank, in Bracket open, PairwiseSumStaircase.Walk walk, out long count)
    {
        long below = _sums.CutAt(value, open.FirstRow, open.EndRow, walk);
        count = open.Below + below;
        if (rank <= count)
        {
            _sums.KeepBelow(open.FirstRow, open.EndRow);
            return WithoutEmptyRows(open with { Candidates = below, High = value });
        }

        _sums.KeepOthers(open.FirstRow, open.EndRow);
        return WithoutEmptyRows(open with { Candidates = open.Candidates - below, Below = count, Low = value });
    }

    private Bracket WithoutEmptyRows(in Bracket open)
    {
        int first = open.FirstRow, end = open.EndRow;
        while (_sums.Left[first] == _sums.Right[first])
            first++;
        while (_sums.Left[end - 1] == _sums.Right[end - 1])
            end--;
        return open with { FirstRow = first, EndRow = end };
    }

    // Low and High become the smallest and the largest candidate.
    private Bracket Tighten(in Bracket open)
    {
        double low = double.PositiveInfinity, high = double.NegativeInfinity;
        for (int row = open.FirstRow; row < open.EndRow; row++)
        {
            if (_sums.Left[row] == _sums.Right[row])
                continue;
            low = Math.Min(low, _sums.Sum(row, _sums.Left[row]));
            high = Math.Max(high, _sums.Sum(row, _sums.Right[row] - 1));
        }

        return open with { Low = low, High = high };
    }

    private double MiddleRowMedian(in Bracket open)
    {
        int rows = 0;
        for (int row = open.FirstRow; row < open.EndRow; row++)
        {
            int candidates = _sums.Right[row] - _sums.Left[row];
            if (candidates == 0)
                continue;
            _rowMedians[rows] = _sums.Sum(row, _sums.Left[row] + ((candidates - 1) / 2));
            _weights[rows++] = candidates;
        }

        _rowMedians[..rows].Sort(_weights[..rows]);
        long passed = 0;
        int middle = 0;
        while (2 * (passed + _weights[middle]) < open.Candidates)
            passed += _weights[middle++];
        return _rowMedians[middle];
    }

    private double SelectAmongFew(long rank, in Bracket open)
    {
        int kept = 0;
        for (int row = open.FirstRow; row < open.EndRow; row++)
        {
            for (int column = _sums.Left[row]; column < _sums.Right[row]; column++)
                _few[kept++] = _sums.Sum(row, column);
        }

        _few[..kept].Sort();
        return _few[(int)(rank - open.Below - 1)];
    }

    // Candidates: in the rows FirstRow .. EndRow − 1, all from Low to High, after Below smaller sums.
    private readonly record struct Bracket(int FirstRow, int EndRow, long Below, long Candidates, double Low, double High);
}
