using MatchedSuite.Study.Definition;

namespace MatchedSuite.Study.Endpoints;

/// <summary>What stands for values below a detection limit.</summary>
public static class BelowLimitRule
{
    /// <summary>Replaces, in place, every value below the limit.</summary>
    /// <param name="rule">What stands for such a value.</param>
    /// <param name="limit">The detection limit, positive, in the endpoint's unit.</param>
    /// <param name="values">Measured values; NaN is missing and stays.</param>
    public static void Apply(BelowLimit rule, double limit, Span<double> values)
    {
        double replacement = rule switch
        {
            BelowLimit.Half => limit / 2,
            BelowLimit.Root2 => limit / Math.Sqrt(2),
            BelowLimit.Limit => limit,
            _ => double.NaN,
        };
        foreach (ref double value in values)
        {
            if (value < limit)
                value = replacement;
        }
    }

    /// <summary>Writes 1 for a value at or above the limit, 0 for one below, NaN for a missing one.</summary>
    public static void Above(double limit, ReadOnlySpan<double> values, Span<double> above)
    {
        for (int i = 0; i < values.Length; i++)
            above[i] = double.IsNaN(values[i]) ? double.NaN : values[i] < limit ? 0 : 1;
    }
}
