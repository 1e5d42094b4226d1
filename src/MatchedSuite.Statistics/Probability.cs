namespace MatchedSuite.Statistics;

/// <summary>A probability kept together with its decimal logarithm, so that neither digits nor magnitude are lost.</summary>
/// <remarks>
/// <see cref="Value"/> has full double precision while it is a normal number and may underflow to 0;
/// <see cref="Log10"/> stays finite far below that (p = 1e-400 is Log10 = -400). A missing probability is NaN in both.
/// </remarks>
/// <param name="Value">The probability itself, in [0, 1], possibly underflowed to 0.</param>
/// <param name="Log10">Its logarithm to base 10, at most 0; negative infinity only for an impossible event.</param>
public readonly record struct Probability(double Value, double Log10) : IComparable<Probability>
{
    // Below this a double begins to lose digits, so the logarithm decides.
    internal const double SmallestWithAllDigits = 1e-290;

    /// <summary>The certain event.</summary>
    public static Probability One { get; } = new(1, 0);

    /// <summary>The impossible event.</summary>
    public static Probability Zero { get; } = new(0, double.NegativeInfinity);

    /// <summary>No probability: the hypothesis was not tested.</summary>
    public static Probability Missing { get; } = new(double.NaN, double.NaN);

    /// <summary>True where there is no probability.</summary>
    public bool IsMissing => double.IsNaN(Log10);

    /// <summary>A probability known as a plain number in [0, 1].</summary>
    public static Probability Of(double value) => new(value, Math.Log10(value));

    /// <summary>A probability known by its natural logarithm, at most 0.</summary>
    public static Probability FromNaturalLog(double logarithm) => new(Math.Exp(logarithm), logarithm / Math.Log(10));

    /// <summary>A probability known by its decimal logarithm, at most 0.</summary>
    public static Probability FromLog10(double log10) => new(Math.Pow(10, log10), log10);

    /// <summary>The probability times a factor, at most 1: two-sided doubling, Bonferroni's m and the like.</summary>
    /// <param name="factor">A positive, finite number.</param>
    public Probability Times(double factor)
    {
        double product = Value * factor;
        if (product >= 1)
            return One;
        return new Probability(product, Value >= SmallestWithAllDigits ? Math.Log10(product) : Log10 + Math.Log10(factor));
    }

    /// <summary>The smaller of the two; a missing one makes the answer missing.</summary>
    public static Probability Min(Probability left, Probability right) =>
        left.IsMissing || (!right.IsMissing && left.CompareTo(right) <= 0) ? left : right;

    /// <summary>The larger of the two; a missing one makes the answer missing.</summary>
    public static Probability Max(Probability left, Probability right) =>
        left.IsMissing || (!right.IsMissing && left.CompareTo(right) >= 0) ? left : right;

    /// <summary>True where the probability is at most <paramref name="level"/>; false where it is missing.</summary>
    public bool IsAtMost(double level) => Value <= level;

    /// <summary>Orders by size, exact where the value has all its digits and by logarithm below; missing ones come last.</summary>
    public int CompareTo(Probability other)
    {
        if (IsMissing || other.IsMissing)
            return IsMissing.CompareTo(other.IsMissing);
        return Value >= SmallestWithAllDigits && other.Value >= SmallestWithAllDigits
            ? Value.CompareTo(other.Value)
            : Log10.CompareTo(other.Log10);
    }

    /// <summary>
    /// One number that orders as <see cref="CompareTo"/> does, for fast sorts: the value where it has all its digits, else
    /// the logarithm, which is negative and so stands below every value.
    /// </summary>
    internal double SortKey => Value >= SmallestWithAllDigits ? Value : Log10;

    /// <summary>True where the left one is smaller.</summary>
    public static bool operator <(Probability left, Probability right) => left.CompareTo(right) < 0;

    /// <summary>True where the left one is larger.</summary>
    public static bool operator >(Probability left, Probability right) => left.CompareTo(right) > 0;

    /// <summary>True where the left one is not larger.</summary>
    public static bool operator <=(Probability left, Probability right) => left.CompareTo(right) <= 0;

    /// <summary>True where the left one is not smaller.</summary>
    public static bool operator >=(Probability left, Probability right) => left.CompareTo(right) >= 0;
}
