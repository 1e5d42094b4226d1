namespace MatchedSuite.Statistics;

/// <summary>A confidence interval on the scale of its estimate; an end may be infinite (one-sided, or no limit exists).</summary>
/// <param name="Low">Lower end; NaN where there is no interval.</param>
/// <param name="High">Upper end; NaN where there is no interval.</param>
public readonly record struct Interval(double Low, double High)
{
    /// <summary>No interval.</summary>
    public static Interval None { get; } = new(double.NaN, double.NaN);

    /// <summary>True where <paramref name="value"/> lies inside or on an end.</summary>
    public bool Contains(double value) => value >= Low && value <= High;

    /// <summary>
    /// The interval that points the way the test points: both ends when it is two-sided, else the end that the
    /// alternative excludes stays and the other goes to infinity.
    /// </summary>
    /// <param name="low">Lower limit at the confidence that <see cref="TestOptions.TailShare"/> gives.</param>
    /// <param name="high">Upper limit at the same confidence.</param>
    /// <param name="sides">Direction of the alternative.</param>
    public static Interval Pointing(double low, double high, Sides sides) => sides switch
    {
        Sides.Greater => new Interval(low, double.PositiveInfinity),
        Sides.Less => new Interval(double.NegativeInfinity, high),
        _ => new Interval(low, high),
    };
}
