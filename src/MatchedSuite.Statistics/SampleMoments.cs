namespace MatchedSuite.Statistics;

/// <summary>Mean and sum of squared deviations of one sample.</summary>
/// <remarks>Two passes from the first value as origin, so a large level common to all values loses no digit.</remarks>
/// <param name="Count">Values.</param>
/// <param name="Mean">Their mean; NaN where there are none.</param>
/// <param name="Squares">Σ(x − mean)².</param>
internal readonly record struct SampleMoments(int Count, double Mean, double Squares)
{
    /// <summary>Variance over n − 1.</summary>
    public double Variance => Squares / (Count - 1);

    /// <summary>The moments of finite values.</summary>
    public static SampleMoments Of(ReadOnlySpan<double> values)
    {
        if (values.IsEmpty)
            return new SampleMoments(0, double.NaN, double.NaN);
        double origin = values[0], sum = 0;
        foreach (double value in values)
            sum += value - origin;
        double shift = sum / values.Length, squares = 0, rest = 0;
        foreach (double value in values)
        {
            double deviation = value - origin - shift;
            squares += deviation * deviation;
            rest += deviation;
        }

        return new SampleMoments(values.Length, origin + shift, squares - rest * rest / values.Length);
    }
}
