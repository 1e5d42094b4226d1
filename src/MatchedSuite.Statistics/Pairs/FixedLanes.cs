using System.Runtime.Intrinsics;

namespace MatchedSuite.Statistics.Pairs;

/// <summary>Sums and extremes over a column in four lanes, folded in one fixed order: the same bits on every machine.</summary>
internal static class FixedLanes
{
    /// <summary>Sum of the values.</summary>
    public static double Sum(ReadOnlySpan<double> values)
    {
        var lanes = Vector256<double>.Zero;
        int i = 0;
        for (; i <= values.Length - Vector256<double>.Count; i += Vector256<double>.Count)
            lanes += Vector256.Create(values[i..]);
        double sum = Fold(lanes);
        for (; i < values.Length; i++)
            sum += values[i];
        return sum;
    }

    /// <summary>Sum of the deviations from <paramref name="centre"/>, and of their squares.</summary>
    public static (double Deviations, double Squares) Moments(ReadOnlySpan<double> values, double centre)
    {
        var deviations = Vector256<double>.Zero;
        var squares = Vector256<double>.Zero;
        var centres = Vector256.Create(centre);
        int i = 0;
        for (; i <= values.Length - Vector256<double>.Count; i += Vector256<double>.Count)
        {
            var deviation = Vector256.Create(values[i..]) - centres;
            deviations += deviation;
            squares += deviation * deviation;
        }

        double deviationSum = Fold(deviations), squareSum = Fold(squares);
        for (; i < values.Length; i++)
        {
            double deviation = values[i] - centre;
            deviationSum += deviation;
            squareSum += deviation * deviation;
        }

        return (deviationSum, squareSum);
    }

    /// <summary>Sum of the products of two equally long columns.</summary>
    public static double Dot(ReadOnlySpan<double> left, ReadOnlySpan<double> right)
    {
        var lanes = Vector256<double>.Zero;
        int i = 0;
        for (; i <= left.Length - Vector256<double>.Count; i += Vector256<double>.Count)
            lanes += Vector256.Create(left[i..]) * Vector256.Create(right[i..]);
        double sum = Fold(lanes);
        for (; i < left.Length; i++)
            sum += left[i] * right[i];
        return sum;
    }

    /// <summary>Takes <paramref name="factor"/> times <paramref name="other"/> from <paramref name="values"/>, place by place.</summary>
    public static void Subtract(Span<double> values, double factor, ReadOnlySpan<double> other)
    {
        var factors = Vector256.Create(factor);
        int i = 0;
        for (; i <= values.Length - Vector256<double>.Count; i += Vector256<double>.Count)
            (Vector256.Create<double>(values[i..]) - (factors * Vector256.Create(other[i..]))).CopyTo(values[i..]);
        for (; i < values.Length; i++)
            values[i] -= factor * other[i];
    }

    /// <summary>Largest of at least one finite value.</summary>
    public static double Largest(ReadOnlySpan<double> values)
    {
        var lanes = Vector256.Create(values[0]);
        int i = 0;
        for (; i <= values.Length - Vector256<double>.Count; i += Vector256<double>.Count)
            lanes = Vector256.Max(lanes, Vector256.Create(values[i..]));
        double largest = Math.Max(Math.Max(lanes[0], lanes[1]), Math.Max(lanes[2], lanes[3]));
        for (; i < values.Length; i++)
            largest = Math.Max(largest, values[i]);
        return largest;
    }

    /// <summary>Smallest of at least one finite value.</summary>
    public static double Smallest(ReadOnlySpan<double> values)
    {
        var lanes = Vector256.Create(values[0]);
        int i = 0;
        for (; i <= values.Length - Vector256<double>.Count; i += Vector256<double>.Count)
            lanes = Vector256.Min(lanes, Vector256.Create(values[i..]));
        double smallest = Math.Min(Math.Min(lanes[0], lanes[1]), Math.Min(lanes[2], lanes[3]));
        for (; i < values.Length; i++)
            smallest = Math.Min(smallest, values[i]);
        return smallest;
    }

    private static double Fold(Vector256<double> lanes) => (lanes[0] + lanes[1]) + (lanes[2] + lanes[3]);
}
