using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>
/// The sums h(i) + h(j), i ≤ j, of ascending values h, or a(i) + b(j) of two ascending columns, as rows of an ascending matrix,
/// and in each row the columns that are still candidates; a value cuts them along a staircase.
/// </summary>
/// <remarks>
/// Each walk costs O(rows + columns passed), at most O(n), whatever the value. The walks by four neighbours are compiled with all
/// optimisations at their first call: code compiled ahead leaves such comparisons out, and a short run would spend itself in them.
/// </remarks>
internal readonly ref struct PairwiseSumStaircase
{
    // Infinities before and after the values, so that four neighbours can always be read at once.
    private const int Padding = 4;

    private readonly ReadOnlySpan<double> _rows;
    private readonly ReadOnlySpan<double> _padded;
    private readonly bool _isTriangle;
    private readonly Span<int> _left;
    private readonly Span<int> _right;
    private readonly Span<int> _cut;

    /// <summary>Takes ascending values, whose sums with themselves are wanted, into the memory of <paramref name="frame"/>.</summary>
    public PairwiseSumStaircase(ReadOnlySpan<double> halves, in Scratch.Frame frame)
        : this(halves, halves, frame) => _isTriangle = true;

    /// <summary>Takes two ascending columns into the memory of <paramref name="frame"/>.</summary>
    public PairwiseSumStaircase(ReadOnlySpan<double> rows, ReadOnlySpan<double> columns, in Scratch.Frame frame)
    {
        Span<double> padded = frame.Doubles(columns.Length + (2 * Padding));
        padded[..Padding].Fill(double.NegativeInfinity);
        columns.CopyTo(padded[Padding..]);
        padded[^Padding..].Fill(double.PositiveInfinity);
        _rows = rows;
        _padded = padded;
        _left = frame.Integers(rows.Length);
        _right = frame.Integers(rows.Length);
        _cut = frame.Integers(rows.Length);
    }

    /// <summary>From where a cut is sought.</summary>
    public enum Walk
    {
        /// <summary>Along the whole staircase, for a value anywhere.</summary>
        Whole,

        /// <summary>From the left bounds, for a value a few sums above them.</summary>
        UpFromLeft,

        /// <summary>From the right bounds, for a value a few sums below them.</summary>
        DownFromRight,
    }

    /// <summary>First candidate column of each row.</summary>
    public ReadOnlySpan<int> Left => _left;

    /// <summary>Column after the last candidate of each row.</summary>
    public ReadOnlySpan<int> Right => _right;

    /// <summary>Number of columns.</summary>
    public int Columns => _padded.Length - (2 * Padding);

    /// <summary>Number of sums.</summary>
    public long Count => _isTriangle ? (long)Columns * (Columns + 1) / 2 : (long)_rows.Length * Columns;

    /// <summary>One sum.</summary>
    public double Sum(int row, int column) => _rows[row] + Column(column);

    /// <summary>Makes every sum a candidate.</summary>
    public void Open()
    {
        for (int row = 0; row < _left.Length; row++)
            _left[row] = _isTriangle ? row : 0;
        _right.Fill(Columns);
    }

    /// <summary>Cuts the candidates of the rows <paramref name="first"/> .. <paramref name="end"/> − 1 at a value.</summary>
    /// <returns>How many candidates lie below the value.</returns>
    public long CutAt(double value, int first, int end, Walk walk)
    {
        switch (walk)
        {
            case Walk.UpFromLeft:
                UpFromLeft(value, first, end);
                break;
            case Walk.DownFromRight:
                DownFromRight(value, first, end);
                break;
            default:
                Whole(value, first, end);
                break;
        }

        long below = 0;
        for (int row = first; row < end; row++)
            below += _cut[row] - _left[row];
        return below;
    }

    /// <summary>Keeps of the rows last cut the candidates below the value.</summary>
    public void KeepBelow(int first, int end) => _cut[first..end].CopyTo(_right[first..end]);

    /// <summary>Keeps of the rows last cut the candidates at the value and above.</summary>
    public void KeepOthers(int first, int end) => _cut[first..end].CopyTo(_left[first..end]);

    private void Whole(double value, int first, int beyond)
    {
        int end = _right[first];
        for (int row = first; row < beyond; row++)
        {
            int left = _left[row];
            double own = _rows[row];
            end = Math.Min(end, _right[row]);
            while (end > left && own + Column(end - 1) >= value)
                end--;
            _cut[row] = Math.Max(end, left);
        }
    }

    // A few columns right of the left bounds: four at a time and without a branch; where that is not enough, from the row below.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void UpFromLeft(double value, int first, int end)
    {
        var values = Vector256.Create(value);
        int below = 0;
        for (int row = end - 1; row >= first; row--)
        {
            int cut = _left[row];
            double own = _rows[row];
            int steps = Passed(Vector256.LessThan(Vector256.Create(_padded.Slice(cut + Padding, Padding)) + Vector256.Create(own), values));
            cut += steps;
            if (steps == Padding)
            {
                cut = Math.Max(cut, below);
                while (cut < _right[row] && own + Column(cut) < value)
                    cut++;
            }

            below = Math.Min(cut, _right[row]);
            _cut[row] = below;
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void DownFromRight(double value, int first, int end)
    {
        var values = Vector256.Create(value);
        int above = int.MaxValue;
        for (int row = first; row < end; row++)
        {
            int cut = _right[row];
            double own = _rows[row];
            int steps = Passed(Vector256.GreaterThanOrEqual(Vector256.Create(_padded.Slice(cut, Padding)) + Vector256.Create(own), values));
            cut -= steps;
            if (steps == Padding)
            {
                cut = Math.Min(cut, above);
                while (cut > _left[row] && own + Column(cut - 1) >= value)
                    cut--;
            }

            above = Math.Max(cut, _left[row]);
            _cut[row] = above;
        }
    }

    private static int Passed(Vector256<double> comparison) => BitOperations.PopCount(comparison.ExtractMostSignificantBits());

    private double Column(int place) => _padded[place + Padding];
}
