namespace MatchedSuite.Statistics.Pairs;

/// <summary>Selects one rank among the sums h(i) + h(j), i ≤ j, of ascending values h, in O(n log n) and without randomness.</summary>
/// <remarks>
/// <para>The sums form a matrix that ascends along rows and columns, so those below a value are bounded by a staircase that one
/// walk of O(n) finds. Candidates are cut by such staircases until few are left, and those are sorted. The cutting values follow
/// the secant through the last two counts, aimed a little beyond the rank so that it is soon enclosed; where that stalls
/// (many equal sums, long tails), the weighted median of the rows' medians cuts at least a quarter.</para>
/// <para>Sources: Johnson and Mizoguchi (1978), SIAM Journal on Computing 7, 147-153; Monahan (1984), ACM Transactions on
/// Mathematical Software 10, 265-270.</para>
/// </remarks>
internal readonly ref struct WalshSelection
{
    // Sorting this many candidates costs about as much as one more walk.
    private const int SortedAtOnce = 48;

    // How far beyond the rank a cut aims: past the noise of the counts, and past an eighth of the step.
    private const double LeastOvershoot = 8;
    private const double OvershootPerStep = 0.125;

    // Cuts that may remove less than a quarter before the sure way is taken.
    private const int PatientCuts = 2;

    private readonly ReadOnlySpan<double> _halves;
    private readonly Span<int> _left;
    private readonly Span<int> _right;
    private readonly Span<int> _cut;
    private readonly Span<int> _weights;
    private readonly Span<double> _rowMedians;
    private readonly Span<double> _few;

    /// <summary>Prepares selections over the sums of ascending <paramref name="halves"/>, in the memory of <paramref name="frame"/>.</summary>
    public WalshSelection(ReadOnlySpan<double> halves, in Scratch.Frame frame)
    {
        _halves = halves;
        _left = frame.Integers(halves.Length);
        _right = frame.Integers(halves.Length);
        _cut = frame.Integers(halves.Length);
        _weights = frame.Integers(halves.Length);
        _rowMedians = frame.Doubles(halves.Length);
        _few = frame.Doubles(SortedAtOnce);
    }

    /// <summary>The sum of rank <paramref name="rank"/>, counted from 1 for the smallest.</summary>
    /// <param name="rank">Between 1 and n(n+1)/2.</param>
    /// <param name="guess">Where to cut first.</param>
    /// <param name="spacing">Guessed distance between neighbouring sums near the rank.</param>
    public double Select(long rank, double guess, double spacing)
    {
        var open = Everything();
        double cut = guess, lastValue = double.NaN, lastCount = double.NaN;
        int idle = 0;
        while (open.Candidates > SortedAtOnce)
        {
            long before = open.Candidates;
            if (cut > open.Low && cut <= open.High)
            {
                open = CutAt(cut, rank, open, out long count);
                double secant = (cut - lastValue) / (count - lastCount);
                if (secant > 0 && double.IsFinite(secant))
                    spacing = secant;
                (lastValue, lastCount) = (cut, count);
                double step = rank - 0.5 - count;
                double overshoot = (LeastOvershoot + (OvershootPerStep * Math.Abs(step))) * (1 << idle);
                cut += spacing * (step + Math.CopySign(overshoot, step));
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
            open = CutAt(middle, rank, open, out _);
            if (open.Low == middle)
                open = CutAt(Math.BitIncrement(middle), rank, open, out _);
            if (open.Low == middle)
                return middle;
            idle = 0;
        }

        return SelectAmongFew(rank, open);
    }

    private Bracket Everything()
    {
        int n = _halves.Length;
        for (int row = 0; row < n; row++)
        {
            _left[row] = row;
            _right[row] = n;
        }

        return new Bracket(0, n, 0, (long)n * (n + 1) / 2, 2 * _halves[0], 2 * _halves[^1]);
    }

    // Splits the candidates into those below the value and the others, and keeps the part that holds the rank.
    private Bracket CutAt(double value, long rank, in Bracket open, out long count)
    {
        long below = open.Below;
        int end = _right[open.FirstRow];
        for (int row = open.FirstRow; row < open.EndRow; row++)
        {
            int left = _left[row];
            double half = _halves[row];
            end = Math.Min(end, _right[row]);
            while (end > left && half + _halves[end - 1] >= value)
                end--;
            int cut = Math.Max(end, left);
            _cut[row] = cut;
            below += cut - left;
        }

        count = below;
        int rows = open.EndRow - open.FirstRow;
        bool isBelow = rank <= below;
        _cut.Slice(open.FirstRow, rows).CopyTo((isBelow ? _right : _left).Slice(open.FirstRow, rows));
        return WithoutEmptyRows(isBelow
            ? open with { Candidates = below - open.Below, High = value }
            : open with { Candidates = open.Candidates - (below - open.Below), Below = below, Low = value });
    }

    private Bracket WithoutEmptyRows(in Bracket open)
    {
        int first = open.FirstRow, end = open.EndRow;
        while (_left[first] == _right[first])
            first++;
        while (_left[end - 1] == _right[end - 1])
            end--;
        return open with { FirstRow = first, EndRow = end };
    }

    // Low and High become the smallest and the largest candidate.
    private Bracket Tighten(in Bracket open)
    {
        double low = double.PositiveInfinity, high = double.NegativeInfinity;
        for (int row = open.FirstRow; row < open.EndRow; row++)
        {
            if (_left[row] == _right[row])
                continue;
            low = Math.Min(low, _halves[row] + _halves[_left[row]]);
            high = Math.Max(high, _halves[row] + _halves[_right[row] - 1]);
        }

        return open with { Low = low, High = high };
    }

    private double MiddleRowMedian(in Bracket open)
    {
        int rows = 0;
        for (int row = open.FirstRow; row < open.EndRow; row++)
        {
            int candidates = _right[row] - _left[row];
            if (candidates == 0)
                continue;
            _rowMedians[rows] = _halves[row] + _halves[_left[row] + ((candidates - 1) / 2)];
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
            for (int column = _left[row]; column < _right[row]; column++)
                _few[kept++] = _halves[row] + _halves[column];
        }

        _few[..kept].Sort();
        return _few[(int)(rank - open.Below - 1)];
    }

    // Candidates: in the rows FirstRow .. EndRow − 1 the columns _left .. _right − 1, all from Low to High, after Below smaller sums.
    private readonly record struct Bracket(int FirstRow, int EndRow, long Below, long Candidates, double Low, double High);
}
